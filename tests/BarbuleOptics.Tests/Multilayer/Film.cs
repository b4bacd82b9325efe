using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>One film of a test stack.</summary>
internal readonly record struct Film(DiagonalPermittivity Permittivity, double ThicknessNm)
{
    public static Film OfIndex(Complex index, double thicknessNm) => new(DiagonalPermittivity.Isotropic(index * index), thicknessNm);
}
