using System.Globalization;

namespace BarbuleOptics.Files;

/// <summary>Writes a set of files into a folder, all of them or none.</summary>
/// <remarks>
/// Each file is written under a temporary name in the folder itself and flushed to the disk; only when all are complete do they take
/// their names, one rename each. A fault or a cancellation up to then leaves nothing behind, and one among the renames puts
/// back what was there before. Only a loss of power between two renames can leave a part of the set.
/// </remarks>
public static class OutputFolder
{
    /// <summary>Writes <paramref name="files"/> into <paramref name="folder"/>, which is made if it is not there.</summary>
    /// <param name="folder">As the user named it; messages repeat it.</param>
    /// <param name="files">What to write, each under a name of its own.</param>
    /// <param name="force">Whether files that are there are replaced; otherwise they are refused before anything is written.</param>
    /// <param name="obsolete">Names of files of an earlier run that this one does not write: taken away where files may be replaced, refused otherwise.</param>
    /// <param name="cancellation">Ends the writing with nothing left behind; no longer heeded once the renames begin.</param>
    /// <exception cref="OutputException">The output cannot be written.</exception>
    /// <exception cref="OperationCanceledException">Cancelled.</exception>
    /// <exception cref="ArgumentException">Two files have one name, letter case aside.</exception>
    public static void Write(string folder, IReadOnlyList<OutputFile> files, bool force, IReadOnlyList<string> obsolete, CancellationToken cancellation = default)
    {
        ArgumentException.ThrowIfNullOrEmpty(folder);
        ArgumentNullException.ThrowIfNull(files);
        ArgumentNullException.ThrowIfNull(obsolete);
        if (files.DistinctBy(file => file.Name, StringComparer.OrdinalIgnoreCase).Count() < files.Count)
            throw new ArgumentException("Must have names that differ.", nameof(files));
        cancellation.ThrowIfCancellationRequested();
        RefuseExisting(folder, files.Select(file => file.Name).Concat(obsolete), force);
        using var undo = new Undo();
        Guarded(folder, () => MakeFolder(folder, undo));
        List<(string Temporary, string Final)> written = [];
        foreach (OutputFile file in files)
        {
            cancellation.ThrowIfCancellationRequested();
            string final = Path.Combine(folder, file.Name);
            string temporary = Path.Combine(folder, $".{file.Name}.{Path.GetRandomFileName()}.tmp");
            Guarded(final, () => WriteTemporary(temporary, file, undo));
            written.Add((temporary, final));
        }
        cancellation.ThrowIfCancellationRequested();
        List<string> replaced = [];
        foreach ((string temporary, string final) in written)
            Guarded(final, () => Rename(temporary, final, force, replaced, undo));
        foreach (string path in obsolete.Select(name => Path.Combine(folder, name)).Where(File.Exists))
            Guarded(path, () => MoveAside(path, $"{path}.{Path.GetRandomFileName()}.old", replaced, undo));
        undo.Forget();
        foreach (string path in replaced)
            DeleteQuietly(path);
    }

    /// <summary>Refuses what <see cref="Write"/> would refuse before it writes, so that a long calculation is not lost to it.</summary>
    /// <param name="folder">As the user named it; messages repeat it.</param>
    /// <param name="names">Names of the files to come.</param>
    /// <param name="force">Whether files that are there may be replaced.</param>
    /// <exception cref="OutputException">A file is there already, or the folder is none.</exception>
    public static void Check(string folder, IEnumerable<string> names, bool force)
    {
        ArgumentException.ThrowIfNullOrEmpty(folder);
        ArgumentNullException.ThrowIfNull(names);
        RefuseExisting(folder, names, force);
        Guarded(folder, () => RefuseUnwritable(folder));
    }

    private static void RefuseExisting(string folder, IEnumerable<string> names, bool force)
    {
        if (File.Exists(folder))
            throw new OutputException(OutputFault.NotWritable, $"{OneLine.Escape(folder)}: is a file, not a folder");
        foreach (string path in names.Select(name => Path.Combine(folder, name)))
        {
            if (Directory.Exists(path))
                throw new OutputException(OutputFault.NotWritable, $"{OneLine.Escape(path)}: is a folder, where a file is to be written");
            if (!force && File.Exists(path))
                throw new OutputException(OutputFault.Exists, $"{OneLine.Escape(path)}: exists; --force replaces it");
        }
    }

    // The nearest folder that is there decides: a file of a moment within it tells whether it takes any.
    private static void RefuseUnwritable(string folder)
    {
        string nearest = Path.GetFullPath(folder);
        while (!Directory.Exists(nearest))
        {
            if (File.Exists(nearest))
                throw new OutputException(OutputFault.NotWritable, $"{OneLine.Escape(nearest)}: is a file, not a folder");
            nearest = Path.GetDirectoryName(nearest) ?? throw new DirectoryNotFoundException();
        }
        string probe = Path.Combine(nearest, $".{Path.GetRandomFileName()}.tmp");
        using (new FileStream(probe, FileMode.CreateNew, FileAccess.Write, FileShare.None, bufferSize: 1, FileOptions.DeleteOnClose))
        {
        }
    }

    private static void MakeFolder(string folder, Undo undo)
    {
        Stack<string> missing = [];
        for (string? path = Path.GetFullPath(folder); path is not null && !Directory.Exists(path); path = Path.GetDirectoryName(path))
            missing.Push(path);
        foreach (string path in missing)
        {
            Directory.CreateDirectory(path);
            undo.Add(() => Directory.Delete(path));
        }
    }

    private static void WriteTemporary(string temporary, OutputFile file, Undo undo)
    {
        undo.Add(() => File.Delete(temporary));
        using FileStream stream = new(temporary, FileMode.CreateNew, FileAccess.Write, FileShare.None);
        file.WriteTo(stream);
        stream.Flush(flushToDisk: true);
    }

    // What was there waits under another name until every file is in place.
    private static void Rename(string temporary, string final, bool force, List<string> replaced, Undo undo)
    {
        if (force && File.Exists(final))
        {
            MoveAside(final, temporary + ".old", replaced, undo);
        }
        else if (File.Exists(final))
        {
            throw new OutputException(OutputFault.Exists, $"{OneLine.Escape(final)}: exists; --force replaces it");
        }
        File.Move(temporary, final);
        undo.Add(() => File.Delete(final));
    }

    private static void MoveAside(string path, string aside, List<string> replaced, Undo undo)
    {
        File.Move(path, aside);
        undo.Add(() => File.Move(aside, path, overwrite: true));
        replaced.Add(aside);
    }

    private static void Guarded(string path, Action action)
    {
        try
        {
            action();
        }
        catch (OutputException)
        {
            throw;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or NotSupportedException)
        {
            throw Translate(path, e);
        }
    }

    /// <summary>What to tell the user of something that could not be written.</summary>
    internal static OutputException Translated(string path, Exception cause) => Translate(path, cause);

    private static OutputException Translate(string path, Exception cause)
        => new(IsFull(cause) ? OutputFault.DiskFull : OutputFault.NotWritable, $"{OneLine.Escape(path)}: {(IsFull(cause) ? "" : "cannot be written: ")}{Reason(cause)}", cause);

    /// <summary>Why something could not be written, in words that name no temporary file.</summary>
    public static string Reason(Exception cause)
    {
        ArgumentNullException.ThrowIfNull(cause);
        return cause switch
        {
            _ when IsFull(cause) => "no space is left on the disk",
            UnauthorizedAccessException => "permission is denied",
            PathTooLongException => "the path is too long",
            DirectoryNotFoundException or FileNotFoundException => "no folder can be made there",
            _ => string.Create(CultureInfo.InvariantCulture, $"the system refuses (error {cause.HResult & 0xFFFF})"),
        };
    }

    // 28 is ENOSPC, 122 EDQUOT (Linux), 69 EDQUOT (macOS); 0x80070027 and 0x80070070 are Windows' two kinds of a full disk.
    private static bool IsFull(Exception cause)
        => cause is IOException && cause.HResult is 28 or 122 or 69 or unchecked((int)0x80070027) or unchecked((int)0x80070070);

    private static void DeleteQuietly(string path) => Undo.Quietly(() => File.Delete(path));
}
