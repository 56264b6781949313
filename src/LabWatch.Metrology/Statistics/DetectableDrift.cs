using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// What monitoring would miss: the smallest lasting shift that a number of checks finds with a given power. Each check has an independent normal error; the mean of
/// the last n checks is compared with its limits on both sides, which let a false alarm pass so many times a year, shared evenly over the checks.
/// </summary>
/// <param name="CheckUncertainty">Standard uncertainty of one check, without what all checks share; positive.</param>
/// <param name="ChecksPerYear">Checks of one band a year, positive.</param>
/// <param name="FalseAlarmsPerYear">False alarms a year of the criterion on the source, positive.</param>
/// <param name="Bands">Bands checked, each with limits of its own; at least 1.</param>
/// <param name="Power">Probability with which the shift is found, above 0.5, below 1.</param>
public sealed record DetectableDrift(double CheckUncertainty, double ChecksPerYear = 250, double FalseAlarmsPerYear = 0.1, int Bands = 1, double Power = 0.95)
{
    private const ulong Seed = 0x4452_4946;
    private const int Trials = 100_000;

    /// <summary>Limits of a mean, in its standard deviations.</summary>
    public double Limit => NormalDistribution.UpperQuantile(FalseAlarmsPerYear / (ChecksPerYear * Bands) / 2);

    /// <summary>The smallest shift found within a number of checks: (z of the limits + z of the power) u/sqrt(n).</summary>
    /// <param name="checks">Number of checks n since the shift, at least 1.</param>
    public double ByFormula(int checks)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(checks, 1);
        return (Limit + NormalDistribution.UpperQuantile(1 - Power)) * CheckUncertainty / Math.Sqrt(checks);
    }

    /// <summary>
    /// The same from a seeded simulation of the monitoring itself, check by check: the moving mean with the values from before the shift still in it, which may signal
    /// at any check up to the last. It lies up to a few percent below the formula, which counts the last check alone.
    /// </summary>
    /// <inheritdoc cref="ByFormula"/>
    public double BySimulation(int checks)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(checks, 1);
        var random = new Xoshiro256(Seed);
        double limit = Limit / Math.Sqrt(checks);
        double[] needed = new double[Trials], window = new double[checks];
        for (int trial = 0; trial < Trials; trial++)
        {
            for (int i = 0; i < checks; i++) window[i] = random.NextNormal();
            needed[trial] = double.PositiveInfinity;
            for (int after = 1; after <= checks; after++)
            {
                window[(after - 1) % checks] = random.NextNormal();
                double mean = window.Sum() / checks;
                needed[trial] = Math.Min(needed[trial], (limit - mean) * checks / after);
            }
        }

        Array.Sort(needed);
        return needed[(int)(Power * Trials)] * CheckUncertainty;
    }

    /// <summary>False alarms a year of one band by simulation of years without a shift: runs of signals count once. At most the number asked for.</summary>
    /// <param name="checks">Number of checks in the mean, at least 1.</param>
    /// <param name="years">Years to simulate, positive.</param>
    public double SimulatedFalseAlarms(int checks, int years)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(checks, 1);
        var random = new Xoshiro256(Seed + 1);
        double limit = Limit / Math.Sqrt(checks);
        double[] window = new double[checks];
        for (int i = 0; i < checks; i++) window[i] = random.NextNormal();
        long total = (long)(years * ChecksPerYear);
        int alarms = 0;
        bool signalled = false;
        for (long check = 0; check < total; check++)
        {
            window[check % checks] = random.NextNormal();
            bool signals = Math.Abs(window.Sum() / checks) > limit;
            if (signals && !signalled) alarms++;
            signalled = signals;
        }

        return alarms / (double)years;
    }
}
