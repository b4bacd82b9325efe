using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>An element of order p in depth: its unknowns inside removed, what is left couples the fields at its two planes.</summary>
/// <remarks>The matrix left is the element's Dirichlet-to-Neumann matrix: with the fields (top, bottom) it gives the fluxes
/// (-F top, F bottom). Gauss-Lobatto nodes serve for the integration too, so that operators are needed at the nodes alone.</remarks>
internal sealed class DepthElement
{
    private readonly int _order;
    private readonly int _size;
    private readonly ComplexMatrix _system;

    /// <summary>Scratch for elements of order p with <paramref name="size"/> unknowns a depth.</summary>
    public DepthElement(int order, int size)
    {
        _order = order;
        _size = size;
        _system = new ComplexMatrix((order + 1) * size, (order + 1) * size);
    }

    /// <summary>Condenses one element.</summary>
    /// <param name="rule">How it is integrated; of the same order.</param>
    /// <param name="points">The weak form at the depths of the rule from top to bottom.</param>
    /// <param name="heightNm">Height of the element, in nm.</param>
    /// <param name="symmetric">Whether the weak form is symmetric.</param>
    /// <param name="condensed">Receives the matrix between top and bottom, twice the size of a depth.</param>
    /// <returns>False where elimination fails.</returns>
    public bool TryCondense(ElementRule rule, ReadOnlySpan<DepthPoint> points, double heightNm, bool symmetric, ComplexMatrix condensed)
    {
        Assemble(rule, points, heightNm, symmetric);
        int inner = (_order - 1) * _size, all = inner + 2 * _size;
        bool done = symmetric ? Elimination.TryReduceSymmetric(_system, inner, all) : Elimination.TryReduce(_system, inner, all);
        if (!done)
            return false;
        if (symmetric)
            Elimination.MirrorUpper(_system, inner, all);
        for (int row = 0; row < 2 * _size; row++)
            _system.Row(inner + row)[inner..].CopyTo(condensed.Row(row));
        return true;
    }

    /// <summary>Row of an unknown inside the element condensed last: its factors for those inside, at the top and at the bottom.</summary>
    public ReadOnlySpan<Complex> Removed(int row) => _system.Row(row);

    /// <summary>Place of a node among the unknowns: nodes inside come first, then top and bottom.</summary>
    public static int PlaceOf(int node, int order) => node == 0 ? order - 1 : node == order ? node : node - 1;

    private void Assemble(ElementRule rule, ReadOnlySpan<DepthPoint> points, double heightNm, bool symmetric)
    {
        double half = heightNm / 2;
        double[,] value = rule.Values, slope = rule.Slopes;
        _system.Clear();
        for (int i = 0; i <= _order; i++)
        {
            for (int j = 0; j <= _order; j++)
            {
                int row = PlaceOf(i, _order), column = PlaceOf(j, _order);
                if (symmetric && row > column)
                    continue;
                for (int q = 0; q < points.Length; q++)
                {
                    double weight = rule.Weights[q];
                    if (points[q].IsPlain)
                        AddDiagonal(weight * slope[q, i] * slope[q, j] / half, row, column);
                    else
                    {
                        AddScaled(points[q].Zz, weight * slope[q, i] * slope[q, j] / half, row, column);
                        AddScaled(points[q].Zx, weight * slope[q, i] * value[q, j], row, column);
                        AddScaled(points[q].Xz, weight * value[q, i] * slope[q, j], row, column);
                    }
                    AddScaled(points[q].Xx, weight * value[q, i] * value[q, j] * half, row, column);
                }
            }
        }
    }

    private void AddDiagonal(double value, int row, int column)
    {
        for (int r = 0; r < _size; r++)
            _system[row * _size + r, column * _size + r] += value;
    }

    private void AddScaled(ComplexMatrix block, double factor, int row, int column)
    {
        if (factor == 0)
            return;
        for (int r = 0; r < _size; r++)
            ComplexMatrix.AddScaled(_system.Row(row * _size + r).Slice(column * _size, _size), factor, block.Row(r));
    }
}
