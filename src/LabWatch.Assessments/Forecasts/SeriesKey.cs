namespace LabWatch.Assessments.Forecasts;

/// <summary>One quantity of one scope at one set point.</summary>
/// <param name="Criterion">Code of the criterion whose assessments it is taken from.</param>
/// <param name="Scope">Their scope.</param>
/// <param name="Quantity">What is followed, one of <see cref="TrackedQuantity"/>.</param>
/// <param name="Unit">Its unit.</param>
/// <param name="SetPointCelsius">Set point, to 0.1 degC.</param>
public sealed record SeriesKey(string Criterion, string Scope, string Quantity, string Unit, double SetPointCelsius);
