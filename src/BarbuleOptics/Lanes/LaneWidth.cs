using System.Runtime.Intrinsics;

namespace BarbuleOptics.Lanes;

/// <summary>Number of bits of the vectors that kernels use: 512, 256, 128, or 64 for no vectors.</summary>
/// <remarks>The widest that the processor has, or the one that the environment variable <c>BARBULE_VECTOR_BITS</c> names. Answers of
/// two widths agree within rounding, not to the last bit.</remarks>
internal readonly record struct LaneWidth
{
    /// <summary>Name of the environment variable that forces a width.</summary>
    public const string Variable = "BARBULE_VECTOR_BITS";

    private LaneWidth(int bits) => Bits = bits;

    /// <summary>The width that kernels use unless told otherwise.</summary>
    public static LaneWidth Default { get; } = Parse(Environment.GetEnvironmentVariable(Variable)) ?? Widest;

    /// <summary>Every width, the widest first; those that the processor lacks are done in several pieces.</summary>
    public static IReadOnlyList<LaneWidth> All { get; } = [new(512), new(256), new(128), new(64)];

    /// <summary>512, 256, 128 or 64.</summary>
    public int Bits { get; }

    /// <summary>Numbers side by side.</summary>
    public int Count => Bits / 64;

    /// <summary>The widest that the processor has.</summary>
    public static LaneWidth Widest
        => Vector512.IsHardwareAccelerated ? new(512) : Vector256.IsHardwareAccelerated ? new(256) : Vector128.IsHardwareAccelerated ? new(128) : new(64);

    /// <summary>The width that a text names; null when it names none, so that a mistyped variable changes nothing.</summary>
    public static LaneWidth? Parse(string? bits) => bits switch
    {
        "512" => new LaneWidth(512),
        "256" => new LaneWidth(256),
        "128" => new LaneWidth(128),
        "64" => new LaneWidth(64),
        _ => null,
    };

    /// <summary>Does work at this width.</summary>
    public TResult Invoke<TAction, TResult>(TAction action)
        where TAction : ILaneAction<TResult>, allows ref struct
        => Bits switch
        {
            512 => action.Invoke<Lanes512>(),
            256 => action.Invoke<Lanes256>(),
            128 => action.Invoke<Lanes128>(),
            _ => action.Invoke<Lanes64>(),
        };
}
