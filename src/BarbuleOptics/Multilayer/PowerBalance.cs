namespace BarbuleOptics.Multilayer;

/// <summary>Where the power of an incident wave of unit power goes.</summary>
/// <remarks>Shares are sums of positive terms and never below 0. Rounding may carry one past 1 in its last digits, which is
/// taken back; that this hides nothing larger shows in the sum of the three, which the tests hold to 1 within 1e-12.</remarks>
internal readonly record struct PowerBalance(double Reflected, double Transmitted, double Lost)
{
    /// <summary>Reflected share.</summary>
    public double Reflected { get; } = Math.Min(Reflected, 1);

    /// <summary>Share that leaves through the last face.</summary>
    public double Transmitted { get; } = Math.Min(Transmitted, 1);

    /// <summary>Share lost in the films, and in the slab behind them if there is one.</summary>
    public double Lost { get; } = Math.Min(Lost, 1);
}
