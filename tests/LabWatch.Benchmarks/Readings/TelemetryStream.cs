using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Benchmarks.Readings;

/// <summary>
/// Telemetry as a reference source gives it, seeded: slow drift and a control ripple, white noise of the sensor, rounded to what the
/// instrument shows. The table says resolution and noise of each channel.
/// </summary>
internal sealed class TelemetryStream(int seed)
{
    /// <summary>Channel, level, resolution, noise as one standard deviation, ripple amplitude; all in the channel's unit.</summary>
    private static readonly (string Name, double Level, double Resolution, double Noise, double Ripple)[] Channels =
    [
        ("well-front", 138.5055, 1e-4, 3e-4, 2e-3),
        ("well-middle", 138.5102, 1e-4, 3e-4, 2e-3),
        ("well-back", 138.5047, 1e-4, 3e-4, 2e-3),
        ("bath-return", 137.9, 1e-4, 5e-4, 4e-3),
        ("monitor-emf", 9_585.3, 0.1, 0.4, 2),
        ("lip", 61.2, 0.01, 0.02, 0.2),
        ("case", 34.7, 0.01, 0.02, 0.1),
        ("ambient", 22.4, 0.01, 0.01, 0.3),
        ("humidity", 41.3, 0.1, 0.1, 1),
        ("purge-flow", 2.5, 0.01, 0.01, 0.02),
        ("heater-power", 415, 0.1, 1.5, 12),
        ("set-point", 100, 0.01, 0, 0),
    ];

    private readonly Random _random = new(seed);
    private readonly Dictionary<int, double[]> _drift = [];

    /// <summary>What was simulated, for the report.</summary>
    public static string Description { get; } =
        "12 channels a source: 4 resistances (0.0001 ohm shown, noise 0.0003 to 0.0005 ohm), 1 voltage (0.1 uV, 0.4 uV), 3 temperatures (0.01 degC, 0.01 to 0.02 degC), " +
        "humidity (0.1 %, 0.1 %), flow (0.01 l/min, 0.01 l/min), power (0.1 W, 1.5 W), set point (steady); all drift and ripple";

    /// <summary>One pack of each source at a time; <paramref name="width"/> readings a pack.</summary>
    public ReadingPack Pack(SourceKey source, int number, Instant time, int width = 12)
    {
        Reading[] readings = new Reading[width];
        if (!_drift.TryGetValue(number, out double[]? drift))
        {
            _drift.Add(number, drift = new double[width]);
        }

        double phase = time.Microseconds / 1e6 * 2 * Math.PI / 600;
        for (int i = 0; i < width; i++)
        {
            var channel = Channels[i % Channels.Length];
            drift[i] += 0.02 * channel.Noise * Normal();
            double value = channel.Level + drift[i] + (channel.Ripple * Math.Sin(phase + i)) + (channel.Noise * Normal());
            string name = i < Channels.Length ? channel.Name : Names.Of(channel.Name, i / Channels.Length);
            readings[i] = new Reading(name, time, Rounded(value, channel.Resolution));
        }

        return new ReadingPack(source, time, readings);
    }

    private static double Rounded(double value, double resolution)
    {
        double steps = Math.Round(1 / resolution);
        return Math.Round(value * steps) / steps;
    }

    private double Normal() => Math.Sqrt(-2 * Math.Log(1 - _random.NextDouble())) * Math.Cos(2 * Math.PI * _random.NextDouble());

    private static class Names
    {
        private static readonly Dictionary<(string, int), string> KnownNames = [];

        public static string Of(string name, int number)
        {
            if (!KnownNames.TryGetValue((name, number), out string? known))
            {
                KnownNames.Add((name, number), known = FormattableString.Invariant($"{name}-{number}"));
            }

            return known;
        }
    }
}
