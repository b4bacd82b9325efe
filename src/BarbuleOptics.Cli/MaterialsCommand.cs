using System.CommandLine;
using System.CommandLine.Completions;
using System.Globalization;
using BarbuleOptics.Files;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Cli;

/// <summary>The command <c>barbule materials</c>: what optical constants there are, their source and range.</summary>
internal static class MaterialsCommand
{
    private static readonly double[] SampleNm = [300, 400, 500, 600, 700];

    public static Command Create()
    {
        var name = new Argument<string?>("NAME") { Description = "A material to show in full; without it all are listed", Arity = ArgumentArity.ZeroOrOne, HelpName = "NAME" };
        var folder = new Option<string?>("--materials") { Description = "Folder of material tables of your own; where a built-in material has the same name, yours is taken", HelpName = "DIR" };
        name.CompletionSources.Add(context =>
        {
            FileResult<MaterialCatalog> catalog = EmbeddedMaterials.WithFolder(context.ParseResult.GetValue(folder));
            return (catalog.Succeeded ? catalog.Value : EmbeddedMaterials.Catalog).Names.Select(known => new CompletionItem(known));
        });
        var command = new Command("materials", "Optical constants: what there is, where it was published and for which wavelengths") { name, folder };
        name.Validators.Add(result => CommandLineErrors.RefuseOptions(result, command));
        folder.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--materials", result.Tokens, "the name of a folder"));
        command.SetAction(parse => Execute(parse.GetValue(name), parse.GetValue(folder), parse.InvocationConfiguration.Output, parse.InvocationConfiguration.Error));
        return command;
    }

    private static int Execute(string? name, string? folder, TextWriter output, TextWriter error)
    {
        FileResult<MaterialCatalog> catalog = EmbeddedMaterials.WithFolder(folder);
        if (!catalog.Succeeded)
        {
            foreach (FileProblem problem in catalog.Problems)
                error.WriteLine(problem);
            return ExitCode.WrongInput;
        }
        if (name is null)
        {
            foreach (MaterialTable table in catalog.Value.Tables)
                output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{table.Material.Name,-22} {Range(table.Material),-16} {table.Material.Source}"));
            return ExitCode.Done;
        }
        MaterialTable? found = catalog.Value.Tables.FirstOrDefault(table => table.Material.Name == name);
        if (found is null)
        {
            string? near = NearMiss.Find(name, catalog.Value.Names);
            error.WriteLine($"barbule: there is no material {OneLine.Quote(name)}; {(near is null ? "allowed " + string.Join(", ", catalog.Value.Names) : $"did you mean {near}?")}");
            return ExitCode.WrongCommandLine;
        }
        Show(found, output);
        return ExitCode.Done;
    }

    private static void Show(MaterialTable table, TextWriter output)
    {
        Material material = table.Material;
        output.WriteLine(material.Name);
        output.WriteLine($"  published for  {Range(material)}");
        output.WriteLine($"  source         {material.Source}");
        output.WriteLine($"  obtained       {material.Obtained}");
        if (material.Note is not null)
            output.WriteLine($"  note           {material.Note}");
        output.WriteLine();
        output.WriteLine("  wavelength nm         n         k");
        foreach (double wavelengthNm in SampleNm)
        {
            bool inside = wavelengthNm >= material.LeastNm && wavelengthNm <= material.MostNm;
            if (inside || material.Extrapolates)
            {
                output.WriteLine(string.Create(CultureInfo.InvariantCulture,
                    $"  {wavelengthNm,13}  {material.N.At(wavelengthNm),8:0.0000}  {material.K.At(wavelengthNm),8:0.0000}{(inside ? "" : "  extrapolated")}"));
            }
        }
    }

    private static string Range(Material material) => string.Create(CultureInfo.InvariantCulture, $"{material.LeastNm}-{material.MostNm} nm");
}
