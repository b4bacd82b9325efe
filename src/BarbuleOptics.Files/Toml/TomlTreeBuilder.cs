using Tomlyn.Syntax;

namespace BarbuleOptics.Files.Toml;

/// <summary>Turns a faultless syntax tree into tables and values, and refuses what is written twice (TOML 1.0, "Keys" and "Table").</summary>
internal sealed class TomlTreeBuilder(ReadingLog log, Func<SourceSpan, SourceLocation> locate)
{
    public TomlTable Build(DocumentSyntax document)
    {
        var root = new TomlTable("", TableOrigin.Header, new SourceLocation(log.Source, 1, 1));
        foreach (KeyValueSyntax pair in document.KeyValues)
            Add(pair, root);
        foreach (TableSyntaxBase section in document.Tables)
        {
            if (OpenSection(section, root) is not { } table)
                continue;
            foreach (KeyValueSyntax pair in section.Items)
                Add(pair, table);
        }
        return root;
    }

    /// <summary>The value of a document that is one <c>key = value</c>; null when it is anything else.</summary>
    public TomlNode? BuildOnlyValue(DocumentSyntax document, string path)
        => document.KeyValues.ChildrenCount == 1 && document.Tables.ChildrenCount == 0 && document.KeyValues.GetChild(0)?.Value is { } value
            ? Value(value, path)
            : null;

    private void Add(KeyValueSyntax pair, TomlTable table)
    {
        SourceLocation at = locate(pair.Key!.Span);
        if (Names(pair.Key, at) is not { } names)
            return;
        foreach (string name in names[..^1])
        {
            if (!table.TryGet(name, out TomlEntry? existing))
            {
                existing = new TomlEntry(name, at, new TomlTable(table.PathOf(name), TableOrigin.Dotted, at));
                table.Put(existing);
            }
            if (existing.Value is not TomlTable { Origin: TableOrigin.Dotted } inner)
            {
                RefuseSecond(table.PathOf(name), at, existing);
                return;
            }
            table = inner;
        }
        string key = names[^1];
        if (table.TryGet(key, out TomlEntry? first))
            RefuseSecond(table.PathOf(key), at, first);
        else
            table.Put(new TomlEntry(key, at, Value(pair.Value!, table.PathOf(key))));
    }

    private TomlTable? OpenSection(TableSyntaxBase section, TomlTable table)
    {
        SourceLocation at = locate(section.Span);
        if (Names(section.Name!, at) is not { } names)
            return null;
        foreach (string name in names[..^1])
        {
            if (!table.TryGet(name, out TomlEntry? existing))
            {
                existing = new TomlEntry(name, at, new TomlTable(table.PathOf(name), TableOrigin.Implicit, at));
                table.Put(existing);
            }
            TomlNode inner = existing.Value is TomlArray { IsOfHeaders: true } many ? many.Items[^1] : existing.Value;
            if (inner is not TomlTable { Origin: not TableOrigin.Inline } next)
            {
                RefuseSecond(table.PathOf(name), at, existing);
                return null;
            }
            table = next;
        }
        return section is TableArraySyntax ? NextOfMany(table, names[^1], at) : Single(table, names[^1], at);
    }

    private TomlTable? Single(TomlTable parent, string key, SourceLocation at)
    {
        if (!parent.TryGet(key, out TomlEntry? existing))
        {
            var table = new TomlTable(parent.PathOf(key), TableOrigin.Header, at);
            parent.Put(new TomlEntry(key, at, table));
            return table;
        }
        if (existing.Value is TomlTable { Origin: TableOrigin.Implicit } known)
        {
            known.BecomeHeader();
            return known;
        }
        RefuseSecond(parent.PathOf(key), at, existing);
        return null;
    }

    private TomlTable? NextOfMany(TomlTable parent, string key, SourceLocation at)
    {
        if (!parent.TryGet(key, out TomlEntry? entry))
        {
            entry = new TomlEntry(key, at, new TomlArray(isOfHeaders: true, at));
            parent.Put(entry);
        }
        if (entry.Value is not TomlArray { IsOfHeaders: true } many)
        {
            RefuseSecond(parent.PathOf(key), at, entry);
            return null;
        }
        var table = new TomlTable(ItemPath(parent.PathOf(key), many), TableOrigin.Header, at);
        many.Add(table);
        return table;
    }

    private TomlNode Value(ValueSyntax value, string path)
    {
        SourceLocation at = locate(value.Span);
        return value switch
        {
            StringValueSyntax text => new TomlText(text.Value ?? "", at),
            IntegerValueSyntax number => new TomlNumber(number.Value, number.Value, at),
            FloatValueSyntax number => new TomlNumber(number.Value, null, at),
            BooleanValueSyntax flag => new TomlFlag(flag.Value, at),
            ArraySyntax list => List(list, path, at),
            InlineTableSyntax table => Table(table, path, at),
            _ => new TomlMoment(at),
        };
    }

    private TomlArray List(ArraySyntax syntax, string path, SourceLocation at)
    {
        var list = new TomlArray(isOfHeaders: false, at);
        foreach (ArrayItemSyntax item in syntax.Items)
            list.Add(Value(item.Value!, item.Value is InlineTableSyntax ? ItemPath(path, list) : path));
        return list;
    }

    private TomlTable Table(InlineTableSyntax syntax, string path, SourceLocation at)
    {
        var table = new TomlTable(path, TableOrigin.Inline, at);
        foreach (InlineTableItemSyntax item in syntax.Items)
            Add(item.KeyValue!, table);
        return table;
    }

    private string[]? Names(KeySyntax key, SourceLocation at)
    {
        if (key.DotKeys.ChildrenCount >= NestingGuard.Most)
        {
            log.Refuse(at, null, FormattableString.Invariant($"found more than {NestingGuard.Most} names joined by dots"));
            return null;
        }
        return [Name(key.Key!), .. key.DotKeys.Select(item => Name(item.Key!))];
    }

    private void RefuseSecond(string path, SourceLocation at, TomlEntry first)
        => log.Refuse(at, path, $"found a second time; allowed once (first at {first.KeyLocation})");

    private static string ItemPath(string path, TomlArray list) => FormattableString.Invariant($"{path}{list.Items.Count + 1}");

    private static string Name(BareKeyOrStringValueSyntax syntax)
        => (syntax is StringValueSyntax text ? text.Value : (syntax as BareKeySyntax)?.Key?.Text) ?? "";
}
