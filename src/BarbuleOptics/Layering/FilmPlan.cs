using System.Numerics;
using BarbuleOptics.Layering.Mixing;

namespace BarbuleOptics.Layering;

/// <summary>The films of a section as far as they are the same at every wavelength: cuts, thicknesses, order.</summary>
internal sealed class FilmPlan
{
    private readonly Section _section;
    private readonly List<DepthSlice> _slices = [];
    private readonly List<int> _mediumOfFilm = [];
    private readonly List<double> _thicknessesNm = [];
    private readonly int _mediumCount;

    private FilmPlan(DepthProfile profile, ReadOnlySpan<int> slices)
    {
        _section = profile.Section;
        var firstSlice = new int[profile.KindCount + 1];
        var medium = new List<int>();
        for (int kind = 0; kind < profile.KindCount; kind++)
        {
            foreach (DepthSlice slice in DepthSlice.Of(profile.Kinds[kind], slices[kind], _section.Materials.Count))
            {
                _slices.Add(slice);
                medium.Add(_mediumCount);
                _mediumCount += slice.FilmCount;
            }
            firstSlice[kind + 1] = _slices.Count;
        }
        foreach (int kind in profile.Order)
        {
            for (int i = firstSlice[kind]; i < firstSlice[kind + 1]; i++)
                AddFilms(_slices[i], medium[i]);
        }
        if (_section.Back is { Coherent: true })
        {
            _mediumOfFilm.Add(_mediumCount++);
            _thicknessesNm.Add(_section.Back.Thickness.CentralNm);
        }
    }

    /// <summary>Number of films.</summary>
    public int FilmCount => _mediumOfFilm.Count;

    /// <summary>Cuts a section into slices.</summary>
    /// <inheritdoc cref="FilmBuilder.Build"/>
    public static FilmPlan Of(DepthProfile profile, ReadOnlySpan<int> slices)
    {
        ArgumentNullException.ThrowIfNull(profile);
        Section section = profile.Section;
        if (!section.IsAcross && !section.IsAlong)
            throw new ArgumentException(FormattableString.Invariant($"Films stand for rods across or along the plane of incidence, not at {section.Axis.Degrees} degrees to it."), nameof(profile));
        return new FilmPlan(profile, slices);
    }

    /// <summary>The films at some wavelengths.</summary>
    /// <param name="permittivities">The section's materials at these wavelengths.</param>
    /// <param name="rule">How a cut is averaged.</param>
    public FilmStack Build(SectionPermittivities permittivities, IMixingRule rule)
    {
        ArgumentNullException.ThrowIfNull(permittivities);
        ArgumentNullException.ThrowIfNull(rule);
        ReadOnlySpan<double> wavelengthsNm = permittivities.WavelengthsNm;
        var media = new OpticalComponents(_mediumCount, wavelengthsNm.Length);
        int medium = 0;
        foreach (DepthSlice slice in _slices)
        {
            slice.Fill(media, medium, permittivities, rule, _section.IsAlong);
            medium += slice.FilmCount;
        }

        ReadOnlySpan<Complex> backing = permittivities.Backing;
        IncoherentBack? back = null;
        if (_section.Back is { Coherent: true })
        {
            for (int w = 0; w < backing.Length; w++)
                media.Set(medium, w, DiagonalPermittivity.Isotropic(backing[w]));
            backing = permittivities.Behind;
        }
        else if (_section.Back is not null)
        {
            back = new IncoherentBack(Quantities.Length.FromNanometres(_section.Back.Thickness.CentralNm), permittivities.Behind);
        }
        return new FilmStack(wavelengthsNm, media, [.. _mediumOfFilm], [.. _thicknessesNm], permittivities.SurroundIndex, backing, back);
    }

    private void AddFilms(DepthSlice slice, int medium)
    {
        for (int film = 0; film < slice.FilmCount; film++)
        {
            _mediumOfFilm.Add(medium + film);
            _thicknessesNm.Add(slice.ThicknessNm / slice.FilmCount);
        }
    }
}
