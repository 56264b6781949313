namespace LabWatch.Metrology.Attribution;

/// <summary>What is thought before the measurement: how often a candidate is at work, and how large it then is (standard deviations, normal, either sign).</summary>
/// <param name="Probability">Probability of each candidate, above 0, below 1.</param>
/// <param name="ThermometerKelvin">Thermometer error, kelvin.</param>
/// <param name="Emissivity">Change of the wall emissivity.</param>
/// <param name="GradientKelvin">Gradient, kelvin.</param>
/// <param name="RelativeSignal">Drift of a comparator, or absorption, relative.</param>
public sealed record CausePriors(
    double Probability = 0.02, double ThermometerKelvin = 0.1, double Emissivity = 0.05, double GradientKelvin = 0.5, double RelativeSignal = 0.005)
{
    internal double Size(CauseKind kind) => kind switch
    {
        CauseKind.ThermometerError => ThermometerKelvin,
        CauseKind.CoatingEmissivity => Emissivity,
        CauseKind.Gradient => GradientKelvin,
        _ => RelativeSignal,
    };
}
