using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>What a stack's media have in common at all wavelengths of a block.</summary>
internal sealed class MediumFacts
{
    /// <summary>Whether s and p are one at normal incidence: ex = ey in every medium.</summary>
    public bool IsUpright { get; private set; }

    /// <summary>Whether s and p travel alike: ex = ey = ez in every medium.</summary>
    public bool IsIsotropic { get; private set; }

    /// <summary>Looks at the media of a stack.</summary>
    public void Find(FilmStack stack, int first, int count)
    {
        OpticalComponents media = stack.Media;
        IsUpright = IsIsotropic = true;
        for (int medium = 0; medium < media.MediumCount; medium++)
        {
            int start = medium * media.WavelengthCount + first;
            bool isUpright = Same(media.XReal, media.YReal) && Same(media.XImaginary, media.YImaginary);
            IsIsotropic &= isUpright && Same(media.ZReal, media.YReal) && Same(media.ZImaginary, media.YImaginary);
            IsUpright &= isUpright;

            bool Same(double[] one, double[] other) => one.AsSpan(start, count).SequenceEqual(other.AsSpan(start, count));
        }
    }
}
