using System.Collections;
using System.Runtime.CompilerServices;

namespace BarbuleOptics.Quantities;

/// <summary>An immutable list that is equal to another when its elements are, so that records holding lists compare by value.</summary>
[CollectionBuilder(typeof(ValueList), nameof(ValueList.Create))]
public sealed class ValueList<T> : IReadOnlyList<T>, IEquatable<ValueList<T>>
{
    private readonly T[] _items;

    internal ValueList(ReadOnlySpan<T> items) => _items = items.ToArray();

    /// <inheritdoc/>
    public int Count => _items.Length;

    /// <inheritdoc/>
    public T this[int index] => _items[index];

    /// <summary>The elements.</summary>
    public ReadOnlySpan<T> AsSpan() => _items;

    /// <inheritdoc/>
    public bool Equals(ValueList<T>? other) => other is not null && _items.AsSpan().SequenceEqual(other._items, EqualityComparer<T>.Default);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as ValueList<T>);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = new HashCode();
        foreach (T item in _items)
            hash.Add(item);
        return hash.ToHashCode();
    }

    /// <inheritdoc/>
    public IEnumerator<T> GetEnumerator() => ((IEnumerable<T>)_items).GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => _items.GetEnumerator();
}

/// <summary>Makes lists that compare by value.</summary>
public static class ValueList
{
    /// <summary>Copies <paramref name="items"/>.</summary>
    public static ValueList<T> Create<T>(ReadOnlySpan<T> items) => new(items);
}
