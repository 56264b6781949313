namespace LabWatch.Metrology.Uncertainty;

/// <summary>A measurement model: the result of one set of inputs. Called from several threads at once.</summary>
/// <param name="inputs">Inputs in the order of the budget.</param>
public delegate double MeasurementModel(ReadOnlySpan<double> inputs);
