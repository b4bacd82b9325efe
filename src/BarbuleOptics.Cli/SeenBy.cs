using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Color;
using BarbuleOptics.Files;
using BarbuleOptics.Prediction;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Cli;

/// <summary>The light, the background and the eyes that a command line names; those in files are read when the work begins.</summary>
/// <param name="Light">Name of an illuminant or path of a file.</param>
/// <param name="Background">Path of a file; null for the flat one.</param>
/// <param name="Eyes">Names of visual systems and paths of files, beside the two averages.</param>
internal sealed record SeenBy(string Light, string? Background, IReadOnlyList<string> Eyes)
{
    /// <summary>The conditions with all that was named; false, with every problem, where a file is wrong.</summary>
    public bool TryApply(PredictionConditions conditions, [NotNullWhen(true)] out PredictionConditions? complete, out IReadOnlyList<FileProblem> problems)
    {
        var found = new List<FileProblem>();
        Illuminant? light = Illuminant.TryFind(Light, out Illuminant? named) ? named : Value(SampledFile.ReadLight(Light), found);
        AdaptingBackground? background = Background is null ? null : Value(SampledFile.ReadBackground(Background), found);
        var eyes = new List<VisualSystem>(VisualSystems.Averages);
        foreach (string text in Eyes)
        {
            VisualSystem? eye = VisualSystems.TryFind(text, out VisualSystem? known) ? known : Value(EyeFile.Read(text), found);
            if (eye is null || eyes.Contains(eye))
                continue;
            if (eyes.Any(other => string.Equals(other.Name, eye.Name, StringComparison.OrdinalIgnoreCase)))
                found.Add(new FileProblem(SourceLocation.Whole(text), "name", $"found {OneLine.Quote(eye.Name)} a second time; allowed one eye of a name"));
            else
                eyes.Add(eye);
        }
        problems = found;
        complete = found.Count > 0 ? null : conditions with { Illuminant = light!, Background = background, Eyes = [.. eyes] };
        return complete is not null;
    }

    private static T? Value<T>(FileResult<T> read, List<FileProblem> problems)
        where T : class
    {
        problems.AddRange(read.Problems);
        return read.Value;
    }
}
