namespace BarbuleOptics.Anatomy;

/// <summary>Whether the sizes of a form go together at their central values.</summary>
public static class FormCheck
{
    /// <summary>Everything that forbids a form.</summary>
    /// <returns>The size at fault, named as in a structure file (<c>lumen</c>), and what was found and what is allowed, in one line.</returns>
    public static IEnumerable<(string Key, string Message)> Faults(MelanosomeForm form)
    {
        switch (form)
        {
            case MelanosomeForm.Rod { Lumen: MeasuredLength lumen } rod when lumen.CentralNm >= rod.Diameter.CentralNm:
                yield return ("lumen", Below(lumen, "0 to below the diameter", rod.Diameter.CentralNm));
                break;
            case MelanosomeForm.FlattenedRod { LumenHeight: MeasuredLength height, LumenWidth: MeasuredLength width } rod:
                if (height.CentralNm >= rod.Height.CentralNm)
                    yield return ("lumen_height", Below(height, "0 to below the height", rod.Height.CentralNm));
                if (width.CentralNm >= rod.Width.CentralNm)
                    yield return ("lumen_width", Below(width, "0 to below the width", rod.Width.CentralNm));
                if ((height.CentralNm == 0) != (width.CentralNm == 0))
                    yield return ("lumen_width", FormattableString.Invariant($"found {width.CentralNm:0.######} with lumen_height {height.CentralNm:0.######}; allowed both 0 or both above 0"));
                break;
            case MelanosomeForm.Platelet { Wall: MeasuredLength wall } platelet:
                double half = Math.Min(platelet.Thickness.CentralNm, platelet.Width.CentralNm) / 2;
                if (wall.CentralNm >= half)
                    yield return ("wall", Below(wall, "above 0 to below half of thickness and width", half));
                break;
            default:
                break;
        }
    }

    private static string Below(MeasuredLength found, string allowed, double limitNm)
        => FormattableString.Invariant($"found {found.CentralNm:0.######}; allowed {allowed}, {limitNm:0.######}");
}
