namespace LabWatch.Service.Calc;

/// <summary>Time series in the input of the calculators: seconds as numbers, or one spacing.</summary>
internal static class CalcTimes
{
    /// <summary>The members that give a series its times.</summary>
    public static IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("time_s", "times in seconds since any moment, rising; give these or step_s").Optional(),
        CalcField.Positive("step_s", "spacing of the values in seconds; give this or time_s").Optional(),
    ];

    /// <summary>Times in microseconds; null after a finding.</summary>
    public static long[]? Read(CalcInput input, int count)
    {
        if (input.Has("time_s") == input.Has("step_s"))
        {
            input.Reject("one-of", string.Empty, "Exactly one of time_s and step_s is needed.", "Give the times, or the spacing of even ones.");
            return null;
        }

        double[] seconds = input.Has("time_s")
            ? input.Numbers("time_s")
            : [.. Enumerable.Range(0, count).Select(i => i * input.Number("step_s"))];
        if (seconds.Length != count)
        {
            input.Reject("length", "time_s", "There is not one time for each value.", "Give as many times as values.");
            return null;
        }

        long[] micros = new long[count];
        for (int i = 0; i < count; i++)
        {
            if (!(Math.Abs(seconds[i]) < 4e12))
            {
                input.Reject("out-of-range", "time_s", "A time lies beyond any calendar.", "Give seconds.");
                return null;
            }

            micros[i] = (long)Math.Round(seconds[i] * 1e6);
            if (i > 0 && micros[i] <= micros[i - 1])
            {
                input.Reject("order", "time_s", "The times do not rise by at least a microsecond.", "Sort the values by time and leave out doubles.");
                return null;
            }
        }

        return micros;
    }
}
