using System.Numerics;

namespace BarbuleOptics.Multilayer;

/// <summary>One passage through films from the far side to the near one: the fields at its end and the power lost on the way.</summary>
internal sealed class FilmPass(int filmCount)
{
    private readonly double[] _lost = new double[filmCount];
    private readonly double[] _scale = new double[filmCount];
    private TangentialField _field;
    private int _passed;

    /// <summary>Fields at the near face of the film last passed.</summary>
    public ref readonly TangentialField Field => ref _field;

    /// <summary>Starts with the outgoing wave in the far half-space.</summary>
    public void Start(Complex farAdmittance)
    {
        _field = new TangentialField(farAdmittance);
        _passed = 0;
    }

    /// <summary>Passes the next film.</summary>
    public void Through(in FilmStep film)
    {
        _field.Pass(film);
        _lost[_passed] = _field.Lost;
        _scale[_passed] = _field.Scale;
        _passed++;
    }

    /// <summary>Takes the power lost in each film from the scale of the fields to the scale of the incident wave.</summary>
    /// <param name="unit">Factor between the two at the near face.</param>
    /// <returns>The factor at the far face.</returns>
    public double Complete(double unit)
    {
        for (int film = _passed - 1; film >= 0; film--)
        {
            _lost[film] *= unit;
            unit *= _scale[film];
        }
        return unit;
    }

    /// <summary>Power lost in each film, in the order passed.</summary>
    public ReadOnlySpan<double> Lost => _lost.AsSpan(0, _passed);
}
