namespace LabWatch.Lab.Sources;

/// <summary>Conditions of the room that the uncertainty budget of a source holds for (ISO/IEC 17025:2017, 6.3); null where the budget says nothing of them.</summary>
/// <param name="AirCelsius">Air temperature, degree Celsius.</param>
/// <param name="RelativeHumidityPercent">Relative humidity, percent.</param>
/// <param name="AirPressurePascal">Air pressure, pascal.</param>
public sealed record PermittedConditions(PermittedRange? AirCelsius, PermittedRange? RelativeHumidityPercent, PermittedRange? AirPressurePascal);
