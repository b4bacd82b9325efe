using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>What the elimination of a slab leaves behind for finding the fields inside: rows of removed unknowns, element by element.</summary>
internal sealed class FieldRecord(int size, int ports, int order)
{
    private readonly List<Element> _elements = [];
    private int _used;

    /// <summary>Forgets all elements.</summary>
    public void Clear() => _used = 0;

    /// <summary>The elements from top to bottom.</summary>
    public ReadOnlySpan<Element> Elements => System.Runtime.InteropServices.CollectionsMarshal.AsSpan(_elements)[.._used];

    /// <summary>Rows of the unknowns at the bottom plane, factors for them and for the ports of both planes.</summary>
    public Complex[] LastRows { get; } = new Complex[size * (size + 2 * ports)];

    /// <summary>Starts an element.</summary>
    public void BeginElement(ElementRule rule)
    {
        if (_used == _elements.Count)
            _elements.Add(new Element(size, ports, order));
        Element element = _elements[_used++];
        element.Rule = rule;
        element.Points.Clear();
    }

    /// <summary>Adds a depth of integration to the element started, with its number in the mesh.</summary>
    public void AddPoint(SlabInterval interval, double zNm, double weightNm, int number)
        => _elements[_used - 1].Points.Add((interval, zNm, weightNm, number));

    /// <summary>Takes the rows that condensing and joining the element have left.</summary>
    public void EndElement(DepthElement condenser, SlabChain chain, double heightNm)
    {
        Element element = _elements[_used - 1];
        element.HeightNm = heightNm;
        int inner = (order - 1) * size, wide = (order + 1) * size;
        for (int row = 0; row < inner; row++)
            condenser.Removed(row)[..wide].CopyTo(element.InnerRows.AsSpan(row * wide));
        wide = 2 * size + ports;
        for (int row = 0; row < size; row++)
            chain.Removed(row)[..wide].CopyTo(element.TopRows.AsSpan(row * wide));
    }

    /// <summary>Takes the rows of the bottom plane.</summary>
    public void End(SlabChain chain)
    {
        int wide = size + 2 * ports;
        for (int row = 0; row < size; row++)
            chain.Removed(row)[..wide].CopyTo(LastRows.AsSpan(row * wide));
    }

    /// <summary>Solves the rows of removed unknowns, the last first: row . (unknowns, known) = 0.</summary>
    /// <param name="rows">Rows, each as long as <paramref name="values"/>.</param>
    /// <param name="count">Number of unknowns, which come first.</param>
    /// <param name="values">The unknowns, then what is known.</param>
    public static void BackSubstitute(ReadOnlySpan<Complex> rows, int count, Span<Complex> values)
    {
        for (int row = count - 1; row >= 0; row--)
        {
            ReadOnlySpan<Complex> factors = rows.Slice(row * values.Length, values.Length);
            Complex sum = Complex.Zero;
            for (int i = row + 1; i < values.Length; i++)
                sum += factors[i] * values[i];
            values[row] = -sum / factors[row];
        }
    }

    /// <summary>One element's rows and depths.</summary>
    internal sealed class Element(int size, int ports, int order)
    {
        /// <summary>How it is integrated.</summary>
        public ElementRule Rule { get; set; } = null!;

        /// <summary>Its height, in nm.</summary>
        public double HeightNm { get; set; }

        /// <summary>Depths of integration below the slab's top with their weights, in nm, and their numbers in the mesh.</summary>
        public List<(SlabInterval Interval, double ZNm, double WeightNm, int Number)> Points { get; } = [];

        /// <summary>Rows of the unknowns inside.</summary>
        public Complex[] InnerRows { get; } = new Complex[(order - 1) * size * (order + 1) * size];

        /// <summary>Rows of the unknowns at its top.</summary>
        public Complex[] TopRows { get; } = new Complex[size * (2 * size + ports)];
    }
}
