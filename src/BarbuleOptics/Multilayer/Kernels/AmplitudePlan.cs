namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Where the films of a stack find their values in a table; the steps themselves are left in the workspace.</summary>
/// <param name="Top">Where the reflections of the uppermost face begin.</param>
/// <param name="TopFace">Number of that face.</param>
internal readonly record struct AmplitudePlan(int Top, int TopFace)
{
    /// <summary>Unit of rounding.</summary>
    public const double Rounding = 1.1102230246251565e-16;

    /// <summary>Makes the steps of the films at hand, numbering faces that were not met before.</summary>
    public static AmplitudePlan Of(VectorFilmWorkspace work, DirectionTable table)
    {
        if (!TryMake(work, table, out AmplitudePlan plan))
        {
            // Faces of other stacks fill the table.
            work.ForgetFaces();
            TryMake(work, table, out plan);
        }
        return plan;
    }

    /// <summary>The error bound of <see cref="AmplitudeKernel"/> for |a + rho b| = 1.</summary>
    public double ErrorBound(VectorFilmWorkspace work, DirectionTable table)
    {
        ReadOnlySpan<int> media = work.Films.Medium;
        ReadOnlySpan<double> thicknessesNm = work.Films.ThicknessNm;
        int faceSize = DirectionTable.Values * work.Width.Count;
        double growth = table.GrowthOf(TopFace), radians = 0;
        for (int film = 0; film < media.Length; film++)
        {
            growth *= table.GrowthOf(work.Steps[film].Face / faceSize);
            radians += thicknessesNm[film] * table.Steepness[media[film]];
        }
        double roundings = AmplitudeKernel.ErrorOfFilm * (media.Length + 1) + AmplitudeKernel.ErrorOfRadian * radians;
        return AmplitudeKernel.ErrorOfReflectance * growth * Rounding * roundings;
    }

    private static bool TryMake(VectorFilmWorkspace work, DirectionTable table, out AmplitudePlan plan)
    {
        ReadOnlySpan<int> media = work.Films.Medium;
        ReadOnlySpan<double> thicknessesNm = work.Films.ThicknessNm;
        int size = DirectionTable.Values * work.Width.Count, above = table.Surround, top = 0;
        plan = default;
        for (int film = 0; film <= media.Length; film++)
        {
            int below = film < media.Length ? media[film] : table.Backing;
            int face = work.Pairs.NumberOf(above, below);
            if (face < 0)
                return false;
            if (film == 0)
                top = face;
            else
                work.Steps[film - 1] = new AmplitudeStep(thicknessesNm[film - 1], size * above, size * face, table.IsLossy[above]);
            above = below;
        }
        plan = new AmplitudePlan(size * top, top);
        return true;
    }
}
