using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Small complex symmetric systems, one a lane, solved without interchanges.</summary>
/// <remarks>
/// A system [A | R] of n rows lies row by row in lanes memory, A of n columns, of which the upper triangle is read, and R of c columns.
/// A = U^T D^-1 U is found two rows at a time, two columns of both in one pass over the rows above, so that sums stay in registers.
/// What stands in the place of R in the end is W = D L^-1 R, and S = R^T A^-1 R = W^T D^-1 W follows as a product.
/// With an odd number of rows or columns the first one is done by itself.
/// </remarks>
internal static class SymmetricLanes
{
    /// <summary>Doubles of scratch that <see cref="Eliminate"/> needs for n rows.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int ScratchOf<TLanes>(int n)
        where TLanes : struct, ILanes<TLanes>
        => 3 * n * ComplexLanes<TLanes>.Stride;

    /// <summary>Reduces [A | R] and writes S = R^T A^-1 R, both triangles.</summary>
    /// <param name="system">n rows of n + c elements; overwritten.</param>
    /// <param name="n">Number of unknowns, above 0.</param>
    /// <param name="c">Number of columns of R.</param>
    /// <param name="isIdentity">Whether R is the unit matrix, whose zeros are then made use of.</param>
    /// <param name="result">c rows of c elements.</param>
    /// <param name="scratch">Of <see cref="ScratchOf"/>.</param>
    /// <returns>Square of the largest multiplier: the larger, the more digits are lost.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static TLanes Eliminate<TLanes>(ref double system, int n, int c, bool isIdentity, ref double result, ref double scratch)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, step = (n + c) * size;
        ref double inverses = ref Unsafe.Add(ref scratch, 2 * n * size);
        TLanes growth = TLanes.Broadcast(0);
        int row = n & 1;
        if (row != 0)
            Invert<TLanes>(ref system, ref inverses);
        for (; row < n; row += 2)
        {
            growth = TLanes.Max(growth, SetFactors<TLanes>(ref Unsafe.Add(ref system, row * size), ref inverses, row, step, ref scratch));
            // The last pair of factors links the second row to the first.
            ref double link = ref Unsafe.Add(ref scratch, 2 * row * size);
            growth = TLanes.Max(growth, Corner<TLanes>(ref Unsafe.Add(ref system, row * size), ref scratch, ref inverses, row, step, ref link));
            Reduce<TLanes>(ref Unsafe.Add(ref system, (row + 2) * size), ref scratch, ref link, row, 0, n - row - 2, step, 0);
            ref double right = ref Unsafe.Add(ref system, n * size);
            int odd = c & 1;
            if (odd != 0)
                ReduceOne<TLanes>(ref right, ref scratch, ref link, row, step);
            Reduce<TLanes>(ref Unsafe.Add(ref right, odd * size), ref scratch, ref link, row, odd, (isIdentity ? row + 2 : c) - odd, step, isIdentity ? 1 : 0);
        }
        Multiply<TLanes>(ref Unsafe.Add(ref system, n * size), n, c, step, isIdentity, ref inverses, ref result, ref scratch);
        return growth;
    }

    /// <summary>Keeps a system just reduced, with its inverse pivots behind it.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Keep<TLanes>(ref double system, int n, int c, ref double scratch, ref double slot)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        ref double inverses = ref Unsafe.Add(ref scratch, 2 * n * size);
        LaneSums.Set<TLanes>(ref slot, ref system, 1, ref system, 0, n * (n + c));
        LaneSums.Set<TLanes>(ref Unsafe.Add(ref slot, n * (n + c) * size), ref inverses, 1, ref inverses, 0, n);
    }

    /// <summary>Writes A^-1 R v from a system that was kept.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Recall<TLanes>(ref double slot, int n, int c, ref double v, ref double result)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, step = (n + c) * size;
        ref double inverses = ref Unsafe.Add(ref slot, n * step);
        for (int row = n - 1; row >= 0; row--)
        {
            ref double own = ref Unsafe.Add(ref slot, row * step);
            ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0);
            for (int column = 0; column < c; column++)
                sum = ComplexLanes<TLanes>.MultiplyAdd(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref own, (n + column) * size)), ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref v, column * size)), sum);
            for (int column = row + 1; column < n; column++)
                sum = ComplexLanes<TLanes>.SubtractProduct(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref own, column * size)), ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref result, column * size)), sum);
            ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref inverses, row * size)) * sum, ref Unsafe.Add(ref result, row * size));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Invert<TLanes>(ref double pivot, ref double inverse)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Load(ref pivot).Reciprocal(), ref inverse);

    // What the rows above are multiplied by for a pair of rows; the largest square of them is returned.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static TLanes SetFactors<TLanes>(ref double columns, ref double inverses, int count, int step, ref double factors)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        TLanes most = TLanes.Broadcast(0);
        for (int k = 0; k < count; k++)
        {
            ComplexLanes<TLanes> inverse = ComplexLanes<TLanes>.Load(ref inverses);
            ComplexLanes<TLanes> first = ComplexLanes<TLanes>.Load(ref columns) * inverse;
            ComplexLanes<TLanes> second = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref columns, size)) * inverse;
            most = TLanes.Max(most, TLanes.Max(first.Norm, second.Norm));
            ComplexLanes<TLanes>.Store(first, ref factors);
            ComplexLanes<TLanes>.Store(second, ref Unsafe.Add(ref factors, size));
            inverses = ref Unsafe.Add(ref inverses, size);
            columns = ref Unsafe.Add(ref columns, step);
            factors = ref Unsafe.Add(ref factors, 2 * size);
        }
        return most;
    }

    // The two pivots of a pair of rows, and the factor between them.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static TLanes Corner<TLanes>(ref double columns, ref double factors, ref double inverses, int row, int step, ref double link)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        ref double own = ref Unsafe.Add(ref columns, row * step);
        ComplexLanes<TLanes> a = ComplexLanes<TLanes>.Load(ref own);
        ComplexLanes<TLanes> b = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref own, size));
        ComplexLanes<TLanes> d = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref own, step + size));
        for (int k = 0; k < row; k++)
        {
            ComplexLanes<TLanes> first = ComplexLanes<TLanes>.Load(ref factors), second = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref factors, size));
            ComplexLanes<TLanes> next = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref columns, size));
            a = ComplexLanes<TLanes>.SubtractProduct(first, ComplexLanes<TLanes>.Load(ref columns), a);
            b = ComplexLanes<TLanes>.SubtractProduct(first, next, b);
            d = ComplexLanes<TLanes>.SubtractProduct(second, next, d);
            factors = ref Unsafe.Add(ref factors, 2 * size);
            columns = ref Unsafe.Add(ref columns, step);
        }
        ComplexLanes<TLanes> inverse = a.Reciprocal(), factor = b * inverse;
        d = ComplexLanes<TLanes>.SubtractProduct(factor, b, d);
        ComplexLanes<TLanes>.Store(factor, ref link);
        ComplexLanes<TLanes>.Store(b, ref Unsafe.Add(ref own, size));
        ComplexLanes<TLanes>.Store(inverse, ref Unsafe.Add(ref inverses, row * size));
        ComplexLanes<TLanes>.Store(d.Reciprocal(), ref Unsafe.Add(ref inverses, (row + 1) * size));
        return factor.Norm;
    }

    // Columns of a pair of rows, two at a time: less what the rows above make, and less the first row in the second.
    // Of a unit matrix (skip 1) a column begins at the row of its own number.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void Reduce<TLanes>(ref double columns, ref double factors, ref double link, int row, int first, int count, int step, int skip)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, half = TLanes.Count;
        TLanes linkR = TLanes.Load(in link), linkI = TLanes.Load(in Unsafe.Add(ref link, half));
        int column = 0;
        for (; column + 4 <= count; column += 4)
        {
            int start = skip * Math.Min(first + column, row);
            Four(ref Unsafe.Add(ref factors, 2 * start * size), ref Unsafe.Add(ref columns, start * step), row - start, step,
                out TLanes aR, out TLanes aI, out TLanes bR, out TLanes bI, out TLanes cR, out TLanes cI, out TLanes dR, out TLanes dI,
                out TLanes eR, out TLanes eI, out TLanes fR, out TLanes fI, out TLanes gR, out TLanes gI, out TLanes hR, out TLanes hI);
            ref double own = ref Unsafe.Add(ref columns, row * step);
            Finish(ref own, step, half, linkR, linkI, aR, aI, eR, eI);
            Finish(ref Unsafe.Add(ref own, size), step, half, linkR, linkI, bR, bI, fR, fI);
            Finish(ref Unsafe.Add(ref own, 2 * size), step, half, linkR, linkI, cR, cI, gR, gI);
            Finish(ref Unsafe.Add(ref own, 3 * size), step, half, linkR, linkI, dR, dI, hR, hI);
            columns = ref Unsafe.Add(ref columns, 4 * size);
        }
        for (; column < count; column += 2)
        {
            int start = skip * Math.Min(first + column, row);
            Pair(ref Unsafe.Add(ref factors, 2 * start * size), ref Unsafe.Add(ref columns, start * step), row - start, step,
                out TLanes aR, out TLanes aI, out TLanes bR, out TLanes bI, out TLanes eR, out TLanes eI, out TLanes dR, out TLanes dI);
            ref double own = ref Unsafe.Add(ref columns, row * step);
            Finish(ref own, step, half, linkR, linkI, aR, aI, eR, eI);
            Finish(ref Unsafe.Add(ref own, size), step, half, linkR, linkI, bR, bI, dR, dI);
            columns = ref Unsafe.Add(ref columns, 2 * size);
        }
    }

    // An element of both rows less its sums, and that of the second less the first row's.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Finish<TLanes>(
        ref double own, int step, int half, TLanes linkR, TLanes linkI, TLanes sumR, TLanes sumI, TLanes belowR, TLanes belowI)
        where TLanes : struct, ILanes<TLanes>
    {
        ref double below = ref Unsafe.Add(ref own, step);
        TLanes real = TLanes.Load(in own) - sumR, imaginary = TLanes.Load(in Unsafe.Add(ref own, half)) - sumI;
        TLanes.Store(real, ref own);
        TLanes.Store(imaginary, ref Unsafe.Add(ref own, half));
        belowR = TLanes.Load(in below) - belowR;
        belowI = TLanes.Load(in Unsafe.Add(ref below, half)) - belowI;
        TLanes.Store(TLanes.MultiplyAdd(linkI, imaginary, TLanes.SubtractProduct(linkR, real, belowR)), ref below);
        TLanes.Store(TLanes.SubtractProduct(linkI, real, TLanes.SubtractProduct(linkR, imaginary, belowI)), ref Unsafe.Add(ref below, half));
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void ReduceOne<TLanes>(ref double column, ref double factors, ref double link, int row, int step)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        ref double own = ref Unsafe.Add(ref column, row * step);
        ComplexLanes<TLanes> a = ComplexLanes<TLanes>.Load(ref own), e = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref own, step));
        for (int k = 0; k < row; k++)
        {
            ComplexLanes<TLanes> above = ComplexLanes<TLanes>.Load(ref column);
            a = ComplexLanes<TLanes>.SubtractProduct(ComplexLanes<TLanes>.Load(ref factors), above, a);
            e = ComplexLanes<TLanes>.SubtractProduct(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref factors, size)), above, e);
            factors = ref Unsafe.Add(ref factors, 2 * size);
            column = ref Unsafe.Add(ref column, step);
        }
        ComplexLanes<TLanes>.Store(a, ref own);
        ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.SubtractProduct(ComplexLanes<TLanes>.Load(ref link), a, e), ref Unsafe.Add(ref own, step));
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Multiply<TLanes>(ref double w, int n, int c, int step, bool isIdentity, ref double inverses, ref double result, ref double scratch)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, row = c & 1;
        if (row != 0)
            MultiplyOne<TLanes>(ref w, ref inverses, n, c, step, isIdentity ? 1 : 0, ref result);
        for (; row < c; row += 2)
        {
            int first = isIdentity ? row : 0;
            ref double own = ref Unsafe.Add(ref w, row * size);
            SetFactors<TLanes>(ref Unsafe.Add(ref own, first * step), ref Unsafe.Add(ref inverses, first * size), n - first, step, ref scratch);
            MultiplyPair<TLanes>(ref own, ref scratch, n, row, c, step, first, ref result);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void MultiplyPair<TLanes>(ref double columns, ref double factors, int n, int row, int c, int step, int first, ref double result)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, half = TLanes.Count;
        int column = row;
        for (; column + 4 <= c; column += 4)
        {
            int start = first == 0 ? 0 : column;
            Four(ref Unsafe.Add(ref factors, 2 * (start - first) * size), ref Unsafe.Add(ref columns, start * step), n - start, step,
                out TLanes aR, out TLanes aI, out TLanes bR, out TLanes bI, out TLanes cR, out TLanes cI, out TLanes dR, out TLanes dI,
                out TLanes eR, out TLanes eI, out TLanes fR, out TLanes fI, out TLanes gR, out TLanes gI, out TLanes hR, out TLanes hI);
            ref double upper = ref Unsafe.Add(ref result, (row * c + column) * size);
            Store4(ref upper, size, half, aR, aI, bR, bI);
            Store4(ref Unsafe.Add(ref upper, 2 * size), size, half, cR, cI, dR, dI);
            upper = ref Unsafe.Add(ref upper, c * size);
            Store4(ref upper, size, half, eR, eI, fR, fI);
            Store4(ref Unsafe.Add(ref upper, 2 * size), size, half, gR, gI, hR, hI);
            if (column > row)
            {
                Store4(ref Unsafe.Add(ref result, (column * c + row) * size), size, half, aR, aI, eR, eI);
                Store4(ref Unsafe.Add(ref result, ((column + 1) * c + row) * size), size, half, bR, bI, fR, fI);
            }
            Store4(ref Unsafe.Add(ref result, ((column + 2) * c + row) * size), size, half, cR, cI, gR, gI);
            Store4(ref Unsafe.Add(ref result, ((column + 3) * c + row) * size), size, half, dR, dI, hR, hI);
            columns = ref Unsafe.Add(ref columns, 4 * size);
        }
        for (; column < c; column += 2)
        {
            int start = first == 0 ? 0 : column;
            Pair(ref Unsafe.Add(ref factors, 2 * (start - first) * size), ref Unsafe.Add(ref columns, start * step), n - start, step,
                out TLanes aR, out TLanes aI, out TLanes bR, out TLanes bI, out TLanes eR, out TLanes eI, out TLanes dR, out TLanes dI);
            Store4(ref Unsafe.Add(ref result, (row * c + column) * size), size, half, aR, aI, bR, bI);
            Store4(ref Unsafe.Add(ref result, ((row + 1) * c + column) * size), size, half, eR, eI, dR, dI);
            if (column > row)
            {
                Store4(ref Unsafe.Add(ref result, (column * c + row) * size), size, half, aR, aI, eR, eI);
                Store4(ref Unsafe.Add(ref result, ((column + 1) * c + row) * size), size, half, bR, bI, dR, dI);
            }
            columns = ref Unsafe.Add(ref columns, 2 * size);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void MultiplyOne<TLanes>(ref double w, ref double inverses, int n, int c, int step, int skip, ref double result)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        for (int column = 0; column < c; column++)
        {
            ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0);
            for (int k = skip * column; k < n; k++)
            {
                ref double at = ref Unsafe.Add(ref w, k * step);
                ComplexLanes<TLanes> factor = ComplexLanes<TLanes>.Load(ref at) * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref inverses, k * size));
                sum = ComplexLanes<TLanes>.MultiplyAdd(factor, ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref at, column * size)), sum);
            }
            ComplexLanes<TLanes>.Store(sum, ref Unsafe.Add(ref result, column * size));
            ComplexLanes<TLanes>.Store(sum, ref Unsafe.Add(ref result, column * c * size));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Store4<TLanes>(ref double to, int size, int half, TLanes firstR, TLanes firstI, TLanes secondR, TLanes secondI)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes.Store(firstR, ref to);
        TLanes.Store(firstI, ref Unsafe.Add(ref to, half));
        TLanes.Store(secondR, ref Unsafe.Add(ref to, size));
        TLanes.Store(secondI, ref Unsafe.Add(ref to, size + half));
    }

    // The sum over k of two factors times four columns: (a b c d; e f g h).
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Four<TLanes>(
        ref double factors, ref double columns, int count, int step,
        out TLanes aR, out TLanes aI, out TLanes bR, out TLanes bI, out TLanes cR, out TLanes cI, out TLanes dR, out TLanes dI,
        out TLanes eR, out TLanes eI, out TLanes fR, out TLanes fI, out TLanes gR, out TLanes gI, out TLanes hR, out TLanes hI)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, half = TLanes.Count;
        aR = aI = bR = bI = cR = cI = dR = dI = eR = eI = fR = fI = gR = gI = hR = hI = TLanes.Broadcast(0);
        for (int k = 0; k < count; k++)
        {
            TLanes pR = TLanes.Load(in factors), pI = TLanes.Load(in Unsafe.Add(ref factors, half));
            TLanes qR = TLanes.Load(in Unsafe.Add(ref factors, size)), qI = TLanes.Load(in Unsafe.Add(ref factors, size + half));
            TLanes xR = TLanes.Load(in columns), xI = TLanes.Load(in Unsafe.Add(ref columns, half));
            AddTo(pR, pI, xR, xI, ref aR, ref aI);
            AddTo(qR, qI, xR, xI, ref eR, ref eI);
            xR = TLanes.Load(in Unsafe.Add(ref columns, size));
            xI = TLanes.Load(in Unsafe.Add(ref columns, size + half));
            AddTo(pR, pI, xR, xI, ref bR, ref bI);
            AddTo(qR, qI, xR, xI, ref fR, ref fI);
            xR = TLanes.Load(in Unsafe.Add(ref columns, 2 * size));
            xI = TLanes.Load(in Unsafe.Add(ref columns, 2 * size + half));
            AddTo(pR, pI, xR, xI, ref cR, ref cI);
            AddTo(qR, qI, xR, xI, ref gR, ref gI);
            xR = TLanes.Load(in Unsafe.Add(ref columns, 3 * size));
            xI = TLanes.Load(in Unsafe.Add(ref columns, 3 * size + half));
            AddTo(pR, pI, xR, xI, ref dR, ref dI);
            AddTo(qR, qI, xR, xI, ref hR, ref hI);
            factors = ref Unsafe.Add(ref factors, 2 * size);
            columns = ref Unsafe.Add(ref columns, step);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddTo<TLanes>(TLanes leftR, TLanes leftI, TLanes rightR, TLanes rightI, ref TLanes real, ref TLanes imaginary)
        where TLanes : struct, ILanes<TLanes>
    {
        real = TLanes.SubtractProduct(leftI, rightI, TLanes.MultiplyAdd(leftR, rightR, real));
        imaginary = TLanes.MultiplyAdd(leftI, rightR, TLanes.MultiplyAdd(leftR, rightI, imaginary));
    }

    // The sum over k of two factors times two columns: (a b; e d).
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Pair<TLanes>(
        ref double factors, ref double columns, int count, int step, out TLanes aR, out TLanes aM, out TLanes bR, out TLanes bM,
        out TLanes eR, out TLanes eM, out TLanes dR, out TLanes dM)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count, half = TLanes.Count;
        TLanes zero = TLanes.Broadcast(0);
        // Products of real parts, of imaginary parts, and mixed ones.
        TLanes arr = zero, aii = zero, ari = zero, brr = zero, bii = zero, bri = zero, err = zero, eii = zero, eri = zero, drr = zero, dii = zero, dri = zero;
        for (int k = 0; k < count; k++)
        {
            TLanes pR = TLanes.Load(in factors), pI = TLanes.Load(in Unsafe.Add(ref factors, half));
            TLanes qR = TLanes.Load(in Unsafe.Add(ref factors, size)), qI = TLanes.Load(in Unsafe.Add(ref factors, size + half));
            TLanes xR = TLanes.Load(in columns), xI = TLanes.Load(in Unsafe.Add(ref columns, half));
            arr = TLanes.MultiplyAdd(pR, xR, arr);
            aii = TLanes.MultiplyAdd(pI, xI, aii);
            ari = TLanes.MultiplyAdd(pR, xI, ari);
            err = TLanes.MultiplyAdd(qR, xR, err);
            eii = TLanes.MultiplyAdd(qI, xI, eii);
            eri = TLanes.MultiplyAdd(qR, xI, eri);
            ari = TLanes.MultiplyAdd(pI, xR, ari);
            eri = TLanes.MultiplyAdd(qI, xR, eri);
            TLanes yR = TLanes.Load(in Unsafe.Add(ref columns, size)), yI = TLanes.Load(in Unsafe.Add(ref columns, size + half));
            brr = TLanes.MultiplyAdd(pR, yR, brr);
            bii = TLanes.MultiplyAdd(pI, yI, bii);
            bri = TLanes.MultiplyAdd(pR, yI, bri);
            drr = TLanes.MultiplyAdd(qR, yR, drr);
            dii = TLanes.MultiplyAdd(qI, yI, dii);
            dri = TLanes.MultiplyAdd(qR, yI, dri);
            bri = TLanes.MultiplyAdd(pI, yR, bri);
            dri = TLanes.MultiplyAdd(qI, yR, dri);
            factors = ref Unsafe.Add(ref factors, 2 * size);
            columns = ref Unsafe.Add(ref columns, step);
        }
        aR = arr - aii;
        bR = brr - bii;
        eR = err - eii;
        dR = drr - dii;
        (aM, bM, eM, dM) = (ari, bri, eri, dri);
    }
}
