using System.Diagnostics.CodeAnalysis;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>The mixing rules there are.</summary>
public static class MixingRules
{
    /// <summary>Every rule, in the order of the documentation.</summary>
    public static IReadOnlyList<IMixingRule> All { get; } =
    [
        new MeanIndex(), new MeanPermittivity(), new FormBirefringence(), new SecondOrderFormBirefringence(), new MaxwellGarnett(),
        new SecondOrderAlongRods(new MaxwellGarnett()), new Bruggeman(), new SecondOrderAlongRods(new Bruggeman()),
    ];

    /// <summary>The rule used where none is named: of all, it lies nearest to the rigorous solution (the table in the README).</summary>
    public static IMixingRule Default { get; } = All.Single(rule => rule.Name == "bruggeman-2");

    /// <summary>Finds a rule by its name.</summary>
    public static bool TryFind(string name, [NotNullWhen(true)] out IMixingRule? rule)
        => (rule = All.FirstOrDefault(candidate => candidate.Name == name)) is not null;
}
