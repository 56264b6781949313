using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Instruments;

/// <summary>What an evaluation needs besides the raw value and the certificate. The default value is: nothing known.</summary>
/// <param name="TriplePointOhm">R(TPW) in force with its standard uncertainty, ohm; null to use that of the certificate.</param>
/// <param name="ReferenceJunctionCelsius">
/// Temperature of the reference junctions with its standard uncertainty, degree Celsius; null to use the certificate's, where it states one.
/// </param>
public readonly record struct EvaluationConditions(Estimate? TriplePointOhm, Estimate? ReferenceJunctionCelsius);
