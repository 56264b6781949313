namespace LabWatch.Metrology.Statistics;

/// <summary>One point of an Allan deviation.</summary>
/// <param name="M">Number of values in a mean.</param>
/// <param name="Deviation">Deviation in the unit of the values; NaN where there is none.</param>
/// <param name="Count">Number of differences it is made of.</param>
/// <param name="DegreesOfFreedom">
/// Equivalent degrees of freedom for white noise (SP 1065, section 5.4.1, table 5, white frequency noise); relative standard uncertainty about 1/sqrt(2 edf).
/// </param>
public readonly record struct AllanPoint(int M, double Deviation, int Count, double DegreesOfFreedom);
