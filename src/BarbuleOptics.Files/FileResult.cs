using System.Diagnostics.CodeAnalysis;

namespace BarbuleOptics.Files;

/// <summary>What came of reading a file: the value, or every problem that stands against it.</summary>
public sealed class FileResult<T>
    where T : class
{
    internal FileResult(T? value, IReadOnlyList<FileProblem> problems)
    {
        Value = value;
        Problems = problems;
    }

    /// <summary>The value; null when there are problems.</summary>
    public T? Value { get; }

    /// <summary>The problems, in the order of the file; empty when there is a value.</summary>
    public IReadOnlyList<FileProblem> Problems { get; }

    /// <summary>Whether there is a value.</summary>
    [MemberNotNullWhen(true, nameof(Value))]
    public bool Succeeded => Value is not null;
}

/// <summary>Makes results.</summary>
internal static class FileResult
{
    public static FileResult<T> Success<T>(T value)
        where T : class
        => new(value, []);

    public static FileResult<T> Failure<T>(IReadOnlyList<FileProblem> problems)
        where T : class
        => new(null, problems);

    public static FileResult<T> Failure<T>(SourceLocation location, string message)
        where T : class
        => new(null, [new FileProblem(location, null, message)]);
}
