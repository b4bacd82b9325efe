namespace BarbuleOptics.Tests;

/// <summary>Where the sources lie, for the tests that read them.</summary>
internal static class Repository
{
    /// <summary>The folder of the solution.</summary>
    public static string Root { get; } = Find();

    private static string Find()
    {
        for (string? folder = AppContext.BaseDirectory; folder is not null; folder = Path.GetDirectoryName(folder))
        {
            if (File.Exists(Path.Combine(folder, "BarbuleOptics.sln")))
                return folder;
        }
        throw new InvalidOperationException("The tests run outside a checkout.");
    }
}
