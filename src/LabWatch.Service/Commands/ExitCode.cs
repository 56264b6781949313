namespace LabWatch.Service.Commands;

/// <summary>Exit codes of the program.</summary>
internal static class ExitCode
{
    /// <summary>Done.</summary>
    public const int Success = 0;

    /// <summary>A defect, or a service that ended by itself: a service manager should start it again.</summary>
    public const int Failure = 1;

    /// <summary>The input is wrong; the findings were written to the error output. Starting again changes nothing.</summary>
    public const int BadInput = 2;

    /// <summary>A verification found what is not as it was recorded.</summary>
    public const int TamperingFound = 3;
}
