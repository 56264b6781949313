namespace LabWatch.Metrology.Uncertainty;

/// <summary>Correlation of two inputs of a budget.</summary>
/// <param name="First">Index of one input.</param>
/// <param name="Second">Index of the other.</param>
/// <param name="Coefficient">Correlation coefficient, -1 to 1.</param>
public readonly record struct InputCorrelation(int First, int Second, double Coefficient);
