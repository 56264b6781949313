namespace LabWatch.Simulator.Sources;

/// <summary>
/// The working week of a source, a pure function of UTC time: a plan of set points for each working day, an idle set point (or off) at night and at the
/// weekend. The plans repeat from Monday on where there are fewer than five.
/// </summary>
/// <param name="IdleCelsius">Set point outside the plans; NaN for switched off.</param>
/// <param name="Plans">For each working day the hours (UTC, rising) with the set point from then on.</param>
internal sealed record SetPointRoutine(double IdleCelsius, IReadOnlyList<IReadOnlyList<(double Hour, double Celsius)>> Plans)
{
    private const double ClosingHour = 17.5;
    private const double OpeningHour = 7.5;

    /// <summary>Set point at a moment, degree Celsius; NaN while switched off.</summary>
    public double At(long second)
    {
        (int weekday, double hour) = Split(second);
        double celsius = IdleCelsius;
        if (weekday is >= 1 and <= 5 && hour < ClosingHour)
        {
            foreach ((double from, double wanted) in Plans[(weekday - 1) % Plans.Count])
            {
                celsius = hour >= from ? wanted : celsius;
            }
        }

        return celsius;
    }

    /// <summary>Whether somebody works with the source: the shutter is open then.</summary>
    public static bool InUse(long second)
    {
        (int weekday, double hour) = Split(second);
        return weekday is >= 1 and <= 5 && hour is >= OpeningHour and < ClosingHour;
    }

    // 1 January 1970 was a Thursday; 0 is Sunday.
    private static (int Weekday, double Hour) Split(long second)
    {
        long day = Math.DivRem(second, 86400, out long rest);
        return ((int)((day + 4) % 7), rest / 3600.0);
    }
}
