namespace BarbuleOptics.Files;

/// <summary>Steps that take back what was done, run in reverse at the end unless they were forgotten.</summary>
internal sealed class Undo : IDisposable
{
    private readonly Stack<Action> _steps = [];

    public void Add(Action step) => _steps.Push(step);

    /// <summary>All is done; nothing is to be taken back.</summary>
    public void Forget() => _steps.Clear();

    /// <inheritdoc/>
    public void Dispose()
    {
        while (_steps.TryPop(out Action? step))
            Quietly(step);
    }

    /// <summary>Runs a step of tidying up; what it cannot do must not hide the fault that led to it.</summary>
    public static void Quietly(Action step)
    {
        try
        {
            step();
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
        }
    }
}
