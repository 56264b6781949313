using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Thermometry;

/// <summary>What a raw value means as a temperature.</summary>
/// <param name="Celsius">
/// t90 in degree Celsius with its standard uncertainty in kelvin. Outside the range the value stands, flagged, and the uncertainty is NaN,
/// because nobody has stated one there.
/// </param>
/// <param name="Sensitivity">dt90/dx, kelvin per unit of the raw value; NaN where there is no value.</param>
/// <param name="InRange">Whether the value lies where the characteristic (and the certificate, where there is one) is known.</param>
public readonly record struct TemperatureEvaluation(Estimate Celsius, double Sensitivity, bool InRange)
{
    /// <summary>No temperature: the raw value is missing, in another unit, or means none.</summary>
    public static TemperatureEvaluation None { get; } = new(Estimate.None, double.NaN, false);

    /// <summary>Whether there is a finite temperature.</summary>
    public bool HasValue => Celsius.HasValue;

    /// <summary>
    /// The evaluation of a finite value, <see cref="None"/> of any other; the standard uncertainty (kelvin) is kept inside the range only.
    /// </summary>
    public static TemperatureEvaluation Of(double celsius, double standardUncertaintyKelvin, double sensitivity, bool inRange) =>
        double.IsFinite(celsius)
            ? new(new Estimate(celsius, inRange ? standardUncertaintyKelvin : double.NaN), sensitivity, inRange)
            : None;

    /// <summary>The same evaluation with a narrower range, both ends included, degree Celsius.</summary>
    public TemperatureEvaluation Within(double minimumCelsius, double maximumCelsius) =>
        HasValue
            ? Of(
                Celsius.Value,
                Celsius.StandardUncertainty,
                Sensitivity,
                InRange && Celsius.Value >= minimumCelsius && Celsius.Value <= maximumCelsius)
            : None;
}
