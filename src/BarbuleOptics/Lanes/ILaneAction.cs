namespace BarbuleOptics.Lanes;

/// <summary>Work that is written once for all vector widths.</summary>
/// <typeparam name="TResult">What it returns.</typeparam>
internal interface ILaneAction<TResult>
{
    /// <summary>Does the work with vectors of one width.</summary>
    TResult Invoke<TLanes>()
        where TLanes : struct, ILanes<TLanes>;
}
