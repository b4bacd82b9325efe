using System.Globalization;
using System.Reflection;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>Judges the mixing rules over random structures and the samples, and prints the tables of the README.</summary>
internal static class RuleProgram
{
    private const int Seed = 20;
    private const int Structures = 300;

    private static readonly Angle[] Incidences = [Angle.FromDegrees(0), Angle.FromDegrees(30), Angle.FromDegrees(60)];
    private static readonly WavelengthGrid Grid =
        WavelengthGrid.FromRange(Length.FromNanometres(300), Length.FromNanometres(780), Length.FromNanometres(5));

    /// <summary>Optional word: the number of random structures.</summary>
    public static int Run(string[] words)
    {
        int count = words.Length > 0 ? int.Parse(words[0], CultureInfo.InvariantCulture) : Structures;
        var source = new PlausibleStructures(Seed);
        (string Name, string Form, string Text)[] random =
            [.. Enumerable.Range(0, count).Select(i => (Structure: source.Next(i), Number: i)).Select(one => ($"random {one.Number}", one.Structure.Form, one.Structure.Text))];
        IReadOnlyList<Case> cases = Compare(random), samples = Compare([.. Samples()]);
        IMixingRule best = Best(cases);

        Console.WriteLine(FormattableString.Invariant($"<!-- made by tests/mixing-rules.sh: {count} random structures, seed {Seed} -->"));
        Console.WriteLine(FormattableString.Invariant($"{count} random structures (seed {Seed}: {PlausibleStructures.Ranges}), each at 0, 30 and 60 degrees, 300-780 nm in steps of 5 nm. Median / 95th percentile of the distance from the rigorous solution:"));
        Console.WriteLine();
        Console.WriteLine(RuleTables.Rules(cases));
        Console.WriteLine(FormattableString.Invariant($"`{best.Name}`, whose mean CIEDE2000 in unpolarized light is least, form by form in unpolarized light; *orders inside*: an order other than the zeroth propagates in the matrix somewhere in 400-700 nm. *Below 2*: share of spectra whose color is within 2 of the rigorous one, where the film picture suffices to the eye."));
        Console.WriteLine();
        Console.WriteLine(RuleTables.Forms(cases, best));
        Console.WriteLine("The samples of the program at normal incidence in unpolarized light, CIEDE2000 from the rigorous solution:");
        Console.WriteLine();
        Console.Write(RuleTables.Samples(samples));
        return 0;
    }

    /// <summary>The rule with the least mean difference of color in unpolarized light: the mean feels the tail that a median hides.</summary>
    private static IMixingRule Best(IReadOnlyList<Case> cases)
        => Layering.Mixing.MixingRules.All.MinBy(rule => cases
            .Where(one => one.Rule == rule && one.Polarization == Polarizations.Unpolarized).Average(one => one.Distance.Color))!;

    private static double Median(double[] values) => values.Order().ElementAt(values.Length / 2);

    private static List<Case> Compare((string Name, string Form, string Text)[] structures)
    {
        var comparison = new Comparison(Grid, Incidences);
        var cases = new List<Case>[structures.Length];
        var estimates = new double[structures.Length];
        int done = 0;
        // Each piece of work is long: without a limit the pool would start ever more threads.
        Parallel.For(0, structures.Length, new ParallelOptions { MaxDegreeOfParallelism = Environment.ProcessorCount }, i =>
        {
            (cases[i], estimates[i]) = comparison.Of(structures[i].Name, structures[i].Form, structures[i].Text);
            if (estimates[i] > 2 * Comparison.Accuracy)
                Console.Error.WriteLine(FormattableString.Invariant($"{structures[i].Name} ({structures[i].Form}): error estimate {estimates[i]:0.0e+0}"));
            if (Interlocked.Increment(ref done) % 20 == 0)
                Console.Error.WriteLine(FormattableString.Invariant($"{done} of {structures.Length}"));
        });
        Console.Error.WriteLine(FormattableString.Invariant($"largest error estimate {estimates.Max():0.0e+0}, median {Median(estimates):0.0e+0}"));
        return [.. cases.SelectMany(part => part)];
    }

    private static IEnumerable<(string Name, string Form, string Text)> Samples()
    {
        Assembly self = Assembly.GetExecutingAssembly();
        foreach (string name in self.GetManifestResourceNames().Where(name => name.StartsWith("samples/", StringComparison.Ordinal)).Order(StringComparer.Ordinal))
        {
            using Stream stream = self.GetManifestResourceStream(name)!;
            using var reader = new StreamReader(stream);
            string text = reader.ReadToEnd();
            // Films alone are no test of a rule that averages rows.
            if (text.Contains("spacing", StringComparison.Ordinal) || text.Contains("separation", StringComparison.Ordinal))
                yield return (Path.GetFileNameWithoutExtension(name), "sample", text);
        }
    }
}
