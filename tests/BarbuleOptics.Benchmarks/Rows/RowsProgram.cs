using System.Diagnostics;
using System.Globalization;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Rows;

/// <summary>Times the rigorous solver on five staggered rows of rods, by multipoles and by the Fourier modal method, and says how far
/// each is from a far finer run. A solve is one wavelength in one polarization.</summary>
internal static class RowsProgram
{
    /// <summary>Most repetitions of a block of 61 wavelengths, of which the median counts; each computes its lattice sums or slabs anew.</summary>
    private const int MostRepeats = 50;

    private const double FinestAccuracy = 1e-11;

    private static readonly double[] WavelengthsNm = [.. Enumerable.Range(0, 61).Select(i => 300.0 + 8 * i)];

    /// <summary>Runs it.</summary>
    /// <param name="words">A file for the far finer run, or nothing.</param>
    public static int Run(string[] words)
    {
        if (words.Length > 1)
        {
            Console.Error.WriteLine("rows [FILE]: FILE receives the reflectances of the far finer run, which plain_modal.py reads");
            return 2;
        }
        Dictionary<RowsCase, double[]> finest = RowsCase.All.ToDictionary(rows => rows, rows => Solve(rows, false, FinestAccuracy).Reflectance);
        if (words.Length == 1)
            File.WriteAllLines(words[0], Lines(finest));
        Print("multipole", false, _ => 1e-6, finest);
        Print("modal", true, rows => rows is { LumenNm: > 0, Polarization: Polarizations.P } ? 1e-3 : 1e-4, finest);
        return 0;
    }

    private static void Print(string method, bool slabsOnly, Func<RowsCase, double> accuracy, Dictionary<RowsCase, double[]> finest)
    {
        foreach (IGrouping<(int, string), RowsCase> group in RowsCase.All.GroupBy(rows => (rows.LumenNm, rows.PolarizationName)))
        {
            double error = 0, estimate = 0;
            var microseconds = new List<double>();
            var again = new List<double>();
            foreach (RowsCase rows in group)
            {
                (double[] found, double time, double second, double told) = Solve(rows, slabsOnly, accuracy(rows));
                microseconds.Add(time);
                again.Add(second);
                estimate = Math.Max(estimate, told);
                error = Math.Max(error, found.Zip(finest[rows], (one, other) => Math.Abs(one - other)).Max());
            }
            microseconds.Sort();
            again.Sort();
            Console.WriteLine(string.Create(
                CultureInfo.InvariantCulture,
                $"{method}, accuracy asked {accuracy(group.First()):0e0}, lumen {group.Key.Item1} nm, {group.Key.Item2}: {Middle(microseconds):0.0} us ({Middle(again):0.0} us after the other polarization), error {error:0.0e0}, estimate {estimate:0.0e0}"));
        }
    }

    private static (double[] Reflectance, double Microseconds, double Again, double Estimate) Solve(RowsCase rows, bool slabsOnly, double accuracy)
    {
        SectionPermittivities section = rows.Section(WavelengthsNm);
        var solver = new GratingSolver(accuracy);
        var workspace = new GratingWorkspace(section.Section, slabsOnly);
        double[] reflectance = new double[WavelengthsNm.Length], spare = new double[WavelengthsNm.Length];
        Polarizations other = rows.Polarization ^ Polarizations.Unpolarized;
        double estimate = Once(rows.Incidence, rows.Polarization, reflectance);
        var microseconds = new List<double>();
        var again = new List<double>();
        // Each time from another direction, since the workspace keeps the answer of the last one.
        long begin = Stopwatch.GetTimestamp();
        for (int repeat = 1; repeat == 1 || (accuracy > FinestAccuracy && repeat <= MostRepeats && Stopwatch.GetElapsedTime(begin).TotalSeconds < 0.5); repeat++)
        {
            Time(Angle.FromDegrees(rows.IncidenceDeg + .02 * repeat), rows.Polarization, microseconds);
            // What depends on the direction alone, lattice sums, is known once the other polarization was solved.
            Angle next = Angle.FromDegrees(rows.IncidenceDeg + .02 * repeat + .01);
            Once(next, other, spare);
            Time(next, rows.Polarization, again);
        }
        microseconds.Sort();
        again.Sort();
        return (reflectance, Middle(microseconds), Middle(again), estimate);

        void Time(Angle incidence, Polarizations polarization, List<double> times)
        {
            long start = Stopwatch.GetTimestamp();
            Once(incidence, polarization, spare);
            times.Add(Stopwatch.GetElapsedTime(start).TotalMicroseconds / WavelengthsNm.Length);
        }

        double Once(Angle incidence, Polarizations polarization, double[] result) => solver.Solve(
            section, new SolverRequest(0, WavelengthsNm.Length, incidence, polarization, SolverOutputs.Reflectance), workspace,
            new SolverResponse { Reflectance = result });
    }

    private static double Middle(List<double> sorted) => sorted[sorted.Count / 2];

    private static IEnumerable<string> Lines(Dictionary<RowsCase, double[]> finest)
    {
        yield return "lumen_nm,cortex_nm,incidence_deg,polarization,wavelength_nm,reflectance";
        foreach ((RowsCase rows, double[] reflectance) in finest)
        {
            for (int w = 0; w < reflectance.Length; w++)
            {
                yield return FormattableString.Invariant(
                    $"{rows.LumenNm},{rows.CortexNm},{rows.IncidenceDeg},{rows.PolarizationName},{WavelengthsNm[w]},{reflectance[w]:R}");
            }
        }
    }
}
