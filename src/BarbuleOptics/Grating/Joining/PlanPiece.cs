namespace BarbuleOptics.Grating.Joining;

/// <summary>One piece of a <see cref="StackPlan"/>, met on the way down.</summary>
/// <param name="Step">What it is.</param>
/// <param name="Medium">Number of the medium of a layer, or of that above an interface.</param>
/// <param name="Below">Number of the medium below an interface.</param>
/// <param name="ThicknessNm">Thickness of a layer, in nm.</param>
/// <param name="Kind">Number of the element's kind.</param>
/// <param name="ShiftNm">Sideways place that the phases of orders are counted from here, in nm: an element's own, elsewhere that of an element nearby.</param>
/// <param name="Group">Number of the group of rows of one spacing that it belongs to.</param>
internal readonly record struct PlanPiece(
    PlanStep Step, int Medium, int Below, double ThicknessNm, int Kind, double ShiftNm, int Group);
