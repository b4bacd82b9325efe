namespace BarbuleOptics.Grating.Joining;

/// <summary>Where the answers for one wavelength and polarization stand in one array of numbers.</summary>
/// <param name="Materials">Number of materials of the section.</param>
/// <param name="Backing">Number of the material that the backing is made of; -1 when it is none of the section's.</param>
/// <param name="MostReflected">Largest reflected order told apart.</param>
/// <param name="MostTransmitted">Largest transmitted order told apart.</param>
internal readonly record struct OutcomeLayout(int Materials, int Backing, int MostReflected, int MostTransmitted)
{
    /// <summary>Place of the specular reflectance.</summary>
    public const int Reflected = 0;

    /// <summary>Place of what other orders reflect.</summary>
    public const int Diffracted = 1;

    /// <summary>Place of the transmittance.</summary>
    public const int Transmitted = 2;

    /// <summary>Place of the power lost.</summary>
    public const int Lost = 3;

    /// <summary>Number of the quantities above, whose errors are estimated.</summary>
    public const int Judged = 4;

    /// <summary>Place of the error estimate.</summary>
    public const int Error = 4;

    /// <summary>Place of the first material's share.</summary>
    public const int FirstMaterial = 5;

    /// <summary>Place of reflected order 0.</summary>
    public int ReflectedZeroth => FirstMaterial + Materials + MostReflected;

    /// <summary>Place of transmitted order 0.</summary>
    public int TransmittedZeroth => ReflectedZeroth + MostReflected + 1 + MostTransmitted;

    /// <summary>Number of numbers.</summary>
    public int Length => TransmittedZeroth + MostTransmitted + 1;

    /// <summary>Adds powers lost by material, in units where the incident wave has the power <paramref name="incident"/>; the last is that of the backing.</summary>
    public void AddLost(Span<double> outcome, ReadOnlySpan<double> lost, double incident)
    {
        for (int material = 0; material < lost.Length; material++)
        {
            double share = lost[material] / incident;
            outcome[Lost] += share;
            int place = material < Materials ? material : Backing;
            if (place >= 0)
                outcome[FirstMaterial + place] += share;
        }
    }

    /// <summary>Adds the power of a reflected order.</summary>
    public void AddReflected(Span<double> outcome, int order, double power)
    {
        outcome[order == 0 ? Reflected : Diffracted] += power;
        if (Math.Abs(order) <= MostReflected)
            outcome[ReflectedZeroth + order] += power;
    }

    /// <summary>Adds the power of a transmitted order.</summary>
    public void AddTransmitted(Span<double> outcome, int order, double power)
    {
        outcome[Transmitted] += power;
        if (Math.Abs(order) <= MostTransmitted)
            outcome[TransmittedZeroth + order] += power;
    }
}
