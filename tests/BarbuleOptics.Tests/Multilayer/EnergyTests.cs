using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>R + T + A = 1 (Poynting's theorem), with R from the fields' flux, T from the far field and A from the volume integrals.</summary>
public class EnergyTests
{
    // Largest gap found over these stacks, 120,000 of either kind in s and p: 1.4e-15 on a half-space, 7e-15 on an averaged slab.
    private const double Tolerance = 1e-12;
    private const int Blocks = 60;
    private const int StacksInBlock = 2000;

    [Fact]
    public void Power_balances_over_random_stacks_on_a_half_space() => CheckAll(random => random.Next());

    [Fact]
    public void Power_balances_over_random_stacks_on_a_slab() => CheckAll(random => random.NextOnSlab());

    private static void CheckAll(Func<RandomStacks, (TestStack Stack, double Degrees)> next)
        => Parallel.For(0, Blocks, block =>
        {
            var random = new RandomStacks(seed: 1000 + block);
            for (int i = 0; i < StacksInBlock; i++)
            {
                (TestStack stack, double degrees) = next(random);
                Check(stack, degrees, Polarizations.S);
                Check(stack, degrees, Polarizations.P);
            }
        });

    private static void Check(TestStack stack, double degrees, Polarizations polarization)
    {
        Powers power = stack.Solve(degrees, polarization);
        bool balanced = power.Gap <= Tolerance;
        bool shares = IsShare(power.Reflected) && IsShare(power.Transmitted) && IsShare(power.Absorbed) && power.Films.All(IsShare);
        bool inFilms = stack.SlabThicknessNm is not null || Math.Abs(power.Films.Sum() - power.Absorbed) <= Tolerance;
        Assert.True(balanced && shares && inFilms, FormattableString.Invariant(
            $"{polarization} at {degrees}: R {power.Reflected}, T {power.Transmitted}, A {power.Absorbed}, {stack}, {string.Join(", ", stack.Films)}"));
    }

    private static bool IsShare(double value) => value is >= 0 and <= 1;
}
