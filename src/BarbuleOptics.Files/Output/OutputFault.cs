namespace BarbuleOptics.Files;

/// <summary>Why an output cannot be written.</summary>
public enum OutputFault
{
    /// <summary>A file is there already, and replacing it was not asked for.</summary>
    Exists,

    /// <summary>The folder cannot be made or written to.</summary>
    NotWritable,

    /// <summary>No space is left.</summary>
    DiskFull,
}
