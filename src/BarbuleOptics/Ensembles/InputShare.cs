namespace BarbuleOptics.Ensembles;

/// <summary>How much of an outcome's variance one measurement explains.</summary>
/// <param name="Key">The measurement, as on the command line; several with a plus between them where they were measured together.</param>
/// <param name="First">Share that would go were it known exactly, 0 to 1 but for the error of few draws.</param>
/// <param name="FirstError">Standard error of that share.</param>
/// <param name="Total">Share that would stay were all others known exactly.</param>
/// <param name="TotalError">Standard error of that share.</param>
public sealed record InputShare(string Key, double First, double FirstError, double Total, double TotalError);
