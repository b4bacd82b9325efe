namespace BarbuleOptics.Grating;

/// <summary>How many orders leave a section, and the period they are counted by.</summary>
/// <param name="MostReflected">Largest |n| of an order that travels in the surround; 0 when only the specular one does.</param>
/// <param name="MostTransmitted">Largest |n| of an order that travels in what lies last: the backing, or what is behind a finite one.</param>
/// <param name="PeriodNm">Orders differ by 2 pi over this period along the surface, in nm; null without rows.</param>
public readonly record struct OrderExtent(int MostReflected, int MostTransmitted, double? PeriodNm);
