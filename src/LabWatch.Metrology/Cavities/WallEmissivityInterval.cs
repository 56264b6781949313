namespace LabWatch.Metrology.Cavities;

/// <summary>Which wall emissivities explain a measured effective emissivity. Often nearly all do.</summary>
/// <param name="Lower">Lowest emissivity that explains it.</param>
/// <param name="Upper">Highest emissivity that explains it.</param>
/// <param name="IsEmpty">No emissivity of the range explains it: geometry, temperature or measurement are wrong.</param>
/// <param name="HasInformation">Whether the interval is shorter than half of the range that was thought possible before.</param>
public readonly record struct WallEmissivityInterval(double Lower, double Upper, bool IsEmpty, bool HasInformation)
{
    /// <summary>Finds the interval.</summary>
    /// <param name="counts">Trace of the cavity for the view of the measurement.</param>
    /// <param name="measuredComplement">One minus the measured isothermal effective emissivity; may be negative within its uncertainty.</param>
    /// <param name="expandedUncertainty">Its expanded uncertainty, with what diffuse fraction and model add; positive.</param>
    /// <param name="lowestPossible">Lowest emissivity thought possible before, above 0.</param>
    /// <param name="highestPossible">Highest emissivity thought possible before, at most 1.</param>
    public static WallEmissivityInterval Explaining(
        HitCounts counts, double measuredComplement, double expandedUncertainty, double lowestPossible = 0.5, double highestPossible = 1)
    {
        ArgumentNullException.ThrowIfNull(counts);
        double high = measuredComplement + expandedUncertainty, low = measuredComplement - expandedUncertainty;
        double atLowest = counts.Weights(lowestPossible).IsothermalComplement, atHighest = counts.Weights(highestPossible).IsothermalComplement;
        // 1 - e_eff falls as the wall gets blacker.
        if (high < atHighest || low > atLowest) return new WallEmissivityInterval(double.NaN, double.NaN, true, false);
        double lower = high >= atLowest ? lowestPossible : Solve(counts, high, lowestPossible, highestPossible);
        double upper = low <= atHighest ? highestPossible : Solve(counts, low, lowestPossible, highestPossible);
        return new WallEmissivityInterval(lower, upper, false, upper - lower < (highestPossible - lowestPossible) / 2);
    }

    private static double Solve(HitCounts counts, double complement, double low, double high)
    {
        for (int i = 0; i < 50; i++)
        {
            double middle = (low + high) / 2;
            if (counts.Weights(middle).IsothermalComplement > complement) low = middle;
            else high = middle;
        }

        return (low + high) / 2;
    }
}
