using System.Text.RegularExpressions;
using Xunit;

namespace BarbuleOptics.Tests.Architecture;

/// <summary>Data flows down one list of folders; a folder imports only from folders above it.</summary>
public sealed partial class ImportOrderTests
{
    /// <summary>The folders of the library, from the first that light data meets to the last.</summary>
    private static readonly string[] Folders =
    [
        "Lanes", "Quantities", "Materials", "Anatomy", "Layering", "Multilayer", "Grating", "Spectra", "Color", "Vision", "Prediction",
        "Ensembles", "Comparison", "Inversion", "Morphometry",
    ];

    private static readonly string Sources = Path.Combine(Repository.Root, "src");

    public static TheoryData<string> LibraryFolders => [.. Directory.GetDirectories(Path.Combine(Sources, "BarbuleOptics"))
        .Select(path => Path.GetFileName(path)).Where(name => name is not ("bin" or "obj")).Order(StringComparer.Ordinal)];

    [Theory]
    [MemberData(nameof(LibraryFolders))]
    public void A_folder_of_the_library_imports_only_from_folders_above_it(string folder)
    {
        int place = Array.IndexOf(Folders, folder);
        Assert.True(place >= 0, $"{folder} is not on the list of folders");
        foreach (string file in CodeFiles(Path.Combine(Sources, "BarbuleOptics", folder)))
        {
            foreach (string imported in Mentioned(file))
                Assert.True(Array.IndexOf(Folders, imported) <= place, $"{Path.GetFileName(file)} in {folder} names {imported}, which comes after it");
        }
    }

    [Theory]
    [MemberData(nameof(LibraryFolders))]
    public void A_file_of_the_library_declares_the_namespace_of_its_folder(string folder)
    {
        foreach (string file in CodeFiles(Path.Combine(Sources, "BarbuleOptics", folder)))
        {
            string path = Path.GetRelativePath(Path.Combine(Sources, "BarbuleOptics"), Path.GetDirectoryName(file)!).Replace(Path.DirectorySeparatorChar, '.');
            Assert.Contains($"namespace BarbuleOptics.{path};", File.ReadAllText(file), StringComparison.Ordinal);
        }
    }

    [Fact]
    public void No_code_lies_outside_the_folders_of_the_library()
        => Assert.Empty(Directory.GetFiles(Path.Combine(Sources, "BarbuleOptics"), "*.cs"));

    // A project may name those on the right; only the command joins files and figures.
    [Theory]
    [InlineData("BarbuleOptics", "")]
    [InlineData("BarbuleOptics.Files", "BarbuleOptics")]
    [InlineData("BarbuleOptics.Figures", "BarbuleOptics")]
    [InlineData("BarbuleOptics.Cli", "BarbuleOptics BarbuleOptics.Files BarbuleOptics.Figures")]
    public void A_project_references_only_those_above_it(string project, string allowed)
    {
        string file = Path.Combine(Sources, project, project + ".csproj");
        // A project exists once it has something in it.
        if (!File.Exists(file))
            return;
        string[] referenced = [.. ProjectReference().Matches(File.ReadAllText(file)).Select(match => match.Groups[1].Value)];
        Assert.All(referenced, name => Assert.Contains(name, allowed.Split(' ')));
    }

    [Fact]
    public void The_library_knows_no_console_no_files_no_clock_and_no_network()
    {
        foreach (string file in CodeFiles(Path.Combine(Sources, "BarbuleOptics")))
        {
            Match found = Forbidden().Match(WithoutComments(File.ReadAllText(file)));
            Assert.False(found.Success, $"{Path.GetFileName(file)} uses {found.Value}");
        }
    }

    internal static IEnumerable<string> CodeFiles(string folder)
        => Directory.EnumerateFiles(folder, "*.cs", SearchOption.AllDirectories)
            .Where(file => !file.Contains($"{Path.DirectorySeparatorChar}obj{Path.DirectorySeparatorChar}", StringComparison.Ordinal));

    private static IEnumerable<string> Mentioned(string file)
        => Folder().Matches(WithoutComments(File.ReadAllText(file))).Select(match => match.Groups[1].Value).Where(Folders.Contains).Distinct();

    private static string WithoutComments(string text) => Comment().Replace(text, "");

    [GeneratedRegex(@"//[^\n]*")]
    private static partial Regex Comment();

    [GeneratedRegex(@"BarbuleOptics\.(\w+)")]
    private static partial Regex Folder();

    [GeneratedRegex(@"ProjectReference Include=""\.\./([\w.]+)/")]
    private static partial Regex ProjectReference();

    [GeneratedRegex(@"\bConsole\.|\bFile\.|\bDirectory\.|\bDateTime\b|\bDateTimeOffset\b|\bStopwatch\b|System\.Net|\bHttpClient\b|\bRandom\.Shared\b|new Random\(\)")]
    private static partial Regex Forbidden();
}
