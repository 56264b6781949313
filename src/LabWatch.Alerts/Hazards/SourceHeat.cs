namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Whether a source is heated or hot: any thermometer at or above a temperature, or the heater on. A thermometer that has fallen silent
/// counts with its last value: silence makes nothing cold.
/// </summary>
/// <param name="thermometers">Thermometers of the source.</param>
/// <param name="heater">The heater's power; null where it is not measured or does not count.</param>
/// <param name="hotCelsius">From when on it is hot, degree Celsius.</param>
internal sealed class SourceHeat(IReadOnlyList<HazardChannel> thermometers, HazardChannel? heater, double hotCelsius)
{
    /// <summary>Power that counts as heating, as a part of the most that the heater's meter shows (common practice, no source).</summary>
    private const double HeatingPart = 0.01;

    /// <summary>Power that counts as heating where the meter's end is not known, watt.</summary>
    private const double HeatingWatt = 5;

    /// <summary>The channels that it is judged by.</summary>
    public IReadOnlyList<HazardChannel> Inputs { get; } = heater is null ? thermometers : [.. thermometers, heater];

    /// <summary>Whether it is heated or hot.</summary>
    public bool Is => Celsius >= hotCelsius || (heater is not null && heater.State.LastValue >= HeatingWattOf(heater));

    /// <summary>The highest last value of its thermometers, degree Celsius; NaN where none is known.</summary>
    public double Celsius
    {
        get
        {
            double highest = double.NaN;
            foreach (HazardChannel thermometer in thermometers)
            {
                double value = thermometer.State.LastValue;
                highest = !(highest >= value) && !double.IsNaN(value) ? value : highest;
            }

            return highest;
        }
    }

    /// <summary>The power from which on a heater counts as on, watt.</summary>
    public static double HeatingWattOf(HazardChannel heater) =>
        heater.Channel.SensorMaximum is { } most ? heater.ToNatural(most) * HeatingPart : HeatingWatt;
}
