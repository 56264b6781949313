namespace LabWatch.SystemTests;

/// <summary>Fault tests have a short form for every run and a long one for <c>tests/run --long</c>.</summary>
internal static class TestLength
{
    /// <summary>Whether the long forms run.</summary>
    public static bool IsLong => Environment.GetEnvironmentVariable("LABWATCH_LONG_TESTS") == "1";

    /// <summary>The count for this run.</summary>
    public static int Of(int shortForm, int longForm) => IsLong ? longForm : shortForm;
}
