using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Error estimates against far finer runs of random sections; the factors behind the estimates were chosen on other seeds.</summary>
public class ErrorEstimateTests
{
    [Fact]
    public void Estimates_hold_for_random_rows_of_rods()
        => Check(150, new RandomSections(seed: 901), random => random.Rods(), accuracy: 1e-4, finer: 1e-10);

    [Fact]
    public void Estimates_hold_for_random_flat_bodies()
        => Check(50, new RandomSections(seed: 902), random => random.Flat(), accuracy: 3e-3, finer: 1e-4);

    [Fact]
    public void Estimates_hold_for_random_platelets_across()
        => Check(60, new RandomSections(seed: 904), random => random.Platelets(), accuracy: 1e-3, finer: 4e-5, across: true);

    /// <summary>Rods by multipoles and by modal slabs, which share nothing but the joining of pieces.</summary>
    [Fact]
    public void Multipoles_and_modal_slabs_agree_within_their_estimates()
    {
        var random = new RandomSections(seed: 903);
        int beyond = 0;
        for (int i = 0; i < 100; i++)
        {
            string text = random.Rods();
            double degrees = random.Incidence(), wavelengthNm = random.WavelengthNm();
            Polarizations polarization = random.Polarization();
            GratingCase section = GratingCase.Of(text);
            GratingAnswer rods = section.Solve(wavelengthNm, degrees, polarization, 1e-6), slabs = section.Solve(wavelengthNm, degrees, polarization, 5e-3, slabsOnly: true);
            double difference = rods.Difference(slabs), estimate = rods.Error + slabs.Error;
            Assert.True(difference <= 3 * estimate, FormattableString.Invariant(
                $"{rods} not {slabs} at {wavelengthNm} nm, {degrees} deg, {polarization} of {text}"));
            if (difference > estimate)
                beyond++;
        }
        Assert.True(beyond <= 5, FormattableString.Invariant($"{beyond} of 100 beyond the estimates"));
    }

    private static void Check(int count, RandomSections random, Func<RandomSections, string> next, double accuracy, double finer, bool across = false)
    {
        var overestimates = new List<double>();
        int under = 0;
        for (int i = 0; i < count; i++)
        {
            string text = next(random);
            double axis = across ? 0 : random.Axis(), degrees = random.Incidence(), wavelengthNm = random.WavelengthNm();
            Polarizations polarization = random.Polarization();
            GratingCase section = GratingCase.Of(text).At(axis);
            double[] wavelengthsNm = [wavelengthNm, 1.02 * wavelengthNm, 1.05 * wavelengthNm];
            GratingAnswer[] answers = section.Solve(wavelengthsNm, degrees, polarization, accuracy), truths = section.Solve(wavelengthsNm, degrees, polarization, finer);
            double error = Math.Max(1e-10, answers.Zip(truths, (one, other) => one.Difference(other)).Max());
            double estimate = Math.Max(1e-10, answers.Max(answer => answer.Error));
            Assert.True(error <= 3 * estimate, FormattableString.Invariant($"error {error}, estimate {estimate} at {wavelengthNm} nm, {degrees} deg, axis {axis}, {polarization} of {text}"));
            if (error > estimate)
                under++;
            overestimates.Add(estimate / error);
        }
        overestimates.Sort();
        Assert.True(under <= 0.05 * count, FormattableString.Invariant($"{under} of {count} under"));
        Assert.True(overestimates[count / 2] <= 10, FormattableString.Invariant($"median overestimate {overestimates[count / 2]}"));
    }
}
