namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Power of each order over that of the incident wave; element n + N is order n.</summary>
internal sealed record PlainAnswer(double[] Reflected, double[] Transmitted)
{
    /// <summary>Power reflected into the specular direction.</summary>
    public double Specular => ReflectedInto(0);

    /// <summary>Power reflected into all orders.</summary>
    public double TotalReflected => Reflected.Sum();

    /// <summary>Power through the last face, over all orders.</summary>
    public double TotalTransmitted => Transmitted.Sum();

    public double ReflectedInto(int order) => Reflected[order + Reflected.Length / 2];

    public double TransmittedInto(int order) => Transmitted[order + Transmitted.Length / 2];
}
