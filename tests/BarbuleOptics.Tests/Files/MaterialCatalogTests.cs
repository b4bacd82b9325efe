using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Materials;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Where materials come from: the program, a folder, a path, the structure file itself.</summary>
public sealed class MaterialCatalogTests : IDisposable
{
    private const string Plain = "kind = \"constant\"\nvalue = 1.61";
    private const string Clear = "kind = \"constant\"\nvalue = 0";

    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void The_program_carries_sound_tables_under_their_file_names()
    {
        Assert.Contains("keratin", EmbeddedMaterials.Catalog.Names);
        string[] files = [.. typeof(EmbeddedMaterials).Assembly.GetManifestResourceNames().Where(name => name.StartsWith("material-tables/", StringComparison.Ordinal)).Select(Path.GetFileNameWithoutExtension).OfType<string>().Order(StringComparer.Ordinal)];
        Assert.Equal(files, EmbeddedMaterials.Catalog.Names);
        Assert.All(EmbeddedMaterials.Catalog.Tables, table => Assert.Null(table.File));
    }

    [Fact]
    public void The_defaults_of_structures_are_carried()
    {
        byte[] bytes = Encoding.UTF8.GetBytes(StructureTexts.Rods);
        Assert.True(StructureFile.Parse(bytes, "throat.toml", null, EmbeddedMaterials.Catalog).Succeeded);
        Assert.True(StructureFile.Parse(bytes, "throat.toml", null, EmbeddedMaterials.Catalog, ["barbule.surround=water"]).Succeeded);
    }

    [Fact]
    public void A_folder_adds_tables_and_its_names_win()
    {
        File.WriteAllText(_folder["a.toml"], StructureTexts.TableText("keratin", Plain, Clear));
        File.WriteAllText(_folder["b.toml"], StructureTexts.TableText("chalk", Plain, Clear));
        File.WriteAllText(_folder["readme.txt"], "no table");
        MaterialCatalog catalog = StructureTexts.Catalog.With(_folder.Path).Value!;
        Assert.Equal(["air", "chalk", "eumelanin", "keratin", "water"], catalog.Names);
        Assert.True(catalog.TryFind(new MaterialReference.Named("keratin"), out Material? keratin));
        Assert.Equal(1.61, keratin.IndexAt(500).Real);
        Assert.NotEqual(1.61, StructureTexts.Catalog.Tables.Single(table => table.Material.Name == "keratin").Material.IndexAt(500).Real);
    }

    [Fact]
    public void A_folder_with_a_wrong_table_or_two_of_one_name_is_refused()
    {
        File.WriteAllText(_folder["a.toml"], StructureTexts.TableText("chalk", Plain, Clear));
        File.WriteAllText(_folder["b.toml"], StructureTexts.TableText("chalk", Plain, Clear));
        File.WriteAllText(_folder["c.toml"], "format = 2");
        IReadOnlyList<FileProblem> problems = StructureTexts.Catalog.With(_folder.Path).Problems;
        Assert.Contains(problems, problem => problem.Location.Source == _folder["b.toml"] && problem.Message.Contains("a.toml", StringComparison.Ordinal));
        Assert.Contains(problems, problem => problem.ToString().StartsWith(_folder["c.toml"] + ":1:10: format: found 2", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("nowhere")]
    [InlineData("file")]
    public void A_folder_that_is_none_is_refused(string name)
    {
        File.WriteAllText(_folder["file"], "");
        Assert.Contains("no such folder", Assert.Single(StructureTexts.Catalog.With(_folder[name]).Problems).Message);
    }

    [Theory]
    [InlineData("own.toml")]
    [InlineData("./own.toml")]
    [InlineData("sub/../own.toml")]
    [InlineData("./own")]
    public void A_path_starts_from_the_structure_file(string path)
    {
        Directory.CreateDirectory(_folder["sub"]);
        File.WriteAllText(_folder["own.toml"], StructureTexts.TableText("chalk", Plain, Clear));
        File.WriteAllText(_folder["own"], StructureTexts.TableText("chalk", Plain, Clear));
        File.WriteAllText(_folder["throat.toml"], $"format = 1\ncortex.thickness = 5\n[barbule]\nmatrix = '{path}'\nbacking = '{path}'\n");
        LoadedStructure loaded = StructureFile.Read(_folder["throat.toml"], StructureTexts.Catalog).Value!;
        Assert.Equal(new MaterialReference.TablePath(path), loaded.Barbule.Matrix);
        Assert.True(loaded.Catalog.TryFind(loaded.Barbule.Matrix, out Material? material));
        Assert.Equal(("chalk", 1.61), (material.Name, material.IndexAt(500).Real));
        Assert.False(StructureTexts.Catalog.TryFind(loaded.Barbule.Matrix, out _));
    }

    [Fact]
    public void A_path_to_nothing_is_refused_at_its_line_and_a_wrong_table_at_its_own()
    {
        File.WriteAllText(_folder["wrong.toml"], "format = 1\nname = 5\n");
        File.WriteAllText(_folder["throat.toml"], "format = 1\ncortex.thickness = 5\n[barbule]\nmatrix = 'none.toml'\nbacking = 'wrong.toml'\n");
        IReadOnlyList<FileProblem> problems = StructureFile.Read(_folder["throat.toml"], StructureTexts.Catalog).Problems;
        Assert.Equal(_folder["throat.toml"] + ":4:10: barbule.matrix: found \"none.toml\", a path to a table: there is no such file", problems[0].ToString());
        Assert.Contains(problems, problem => problem.Location == new SourceLocation(_folder["wrong.toml"], 2, 8));
    }

    [Fact]
    public void Names_are_one_to_a_catalog()
        => Assert.Throws<ArgumentException>(() => MaterialCatalog.Of([.. StructureTexts.Catalog.Tables, StructureTexts.Catalog.Tables[0]]));
}
