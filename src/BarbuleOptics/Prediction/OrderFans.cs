using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Prediction;

/// <summary>The orders that propagate on both sides of a section at every angle of incidence.</summary>
internal sealed class OrderFans
{
    private readonly OrderFan[] _reflected;
    private readonly OrderFan[] _transmitted;

    /// <summary>Finds them.</summary>
    public OrderFans(Section section, PredictionConditions conditions, IMaterialCatalog catalog)
    {
        var permittivities = new SectionPermittivities(section, catalog, conditions.Wavelengths.Nanometres);
        double[] surroundIndices = permittivities.SurroundIndex.ToArray();
        Complex[] surround = [.. surroundIndices.Select(index => new Complex(index * index, 0))];
        ReadOnlySpan<Complex> last = permittivities.Behind.IsEmpty ? permittivities.Backing : permittivities.Behind;
        double periodNm = SpacingPlan.Of(section).PeriodNm ?? 0;
        (_reflected, _transmitted) = (new OrderFan[conditions.Incidences.Count], new OrderFan[conditions.Incidences.Count]);
        for (int angle = 0; angle < conditions.Incidences.Count; angle++)
        {
            (double across, double along) = IncidentDirection.Of(section, conditions.Incidences[angle]);
            (double, double)[] transverse = [.. surroundIndices.Select(index => (index * across, index * along))];
            _reflected[angle] = new OrderFan(OrderSide.Reflected, periodNm, conditions.Wavelengths, transverse, surround);
            _transmitted[angle] = new OrderFan(OrderSide.Transmitted, periodNm, conditions.Wavelengths, transverse, last);
        }
    }

    /// <summary>Orders in the surround.</summary>
    public OrderFan Reflected(int angle) => _reflected[angle];

    /// <summary>Orders behind the last face.</summary>
    public OrderFan Transmitted(int angle) => _transmitted[angle];
}
