namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Corrections of an indicating thermometer: t90 = indication + correction, the correction interpolated linearly between the points
/// (common practice, no source). Outside the points the correction of the nearest one is kept and the value is out of range;
/// a single point is a constant correction, in range everywhere.
/// </summary>
/// <param name="Points">Points in strictly rising order of indication, at least one.</param>
public readonly record struct CorrectionTable(IReadOnlyList<CorrectionPoint> Points)
{
    /// <summary>Evaluates an indication.</summary>
    /// <param name="indicatedCelsius">Indication, degree Celsius; NaN means no temperature.</param>
    /// <param name="standardUncertaintyKelvin">Standard uncertainty of the temperature, kelvin.</param>
    public TemperatureEvaluation Evaluate(double indicatedCelsius, double standardUncertaintyKelvin)
    {
        CorrectionPoint first = Points[0];
        CorrectionPoint last = Points[^1];
        if (Points.Count == 1)
        {
            return Corrected(indicatedCelsius, first.CorrectionKelvin, standardUncertaintyKelvin, 1, inRange: true);
        }

        if (!(indicatedCelsius >= first.IndicatedCelsius && indicatedCelsius <= last.IndicatedCelsius))
        {
            CorrectionPoint nearest = indicatedCelsius < first.IndicatedCelsius ? first : last;
            return Corrected(indicatedCelsius, nearest.CorrectionKelvin, standardUncertaintyKelvin, 1, inRange: false);
        }

        int upper = UpperPointOf(indicatedCelsius);
        CorrectionPoint below = Points[upper - 1];
        CorrectionPoint above = Points[upper];
        double slope = (above.CorrectionKelvin - below.CorrectionKelvin) / (above.IndicatedCelsius - below.IndicatedCelsius);
        double correction = below.CorrectionKelvin + (slope * (indicatedCelsius - below.IndicatedCelsius));
        return Corrected(indicatedCelsius, correction, standardUncertaintyKelvin, 1 + slope, inRange: true);
    }

    private static TemperatureEvaluation Corrected(double indicated, double correction, double uncertainty, double sensitivity, bool inRange) =>
        TemperatureEvaluation.Of(indicated + correction, uncertainty, sensitivity, inRange);

    /// <summary>Index of the first point, not the first of all, that is not below an indication inside the table.</summary>
    private int UpperPointOf(double indicated)
    {
        int low = 1;
        int high = Points.Count - 1;
        while (low < high)
        {
            int middle = (low + high) / 2;
            if (Points[middle].IndicatedCelsius < indicated)
            {
                low = middle + 1;
            }
            else
            {
                high = middle;
            }
        }

        return low;
    }
}
