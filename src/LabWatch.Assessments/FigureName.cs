namespace LabWatch.Assessments;

/// <summary>Names of side results that more than one reader looks for.</summary>
public static class FigureName
{
    /// <summary>Set point over the window, degree Celsius.</summary>
    public const string SetPoint = "set-point";

    /// <summary>Mean temperature over the window, degree Celsius.</summary>
    public const string Mean = "mean";

    /// <summary>Standard deviation of the means.</summary>
    public const string StandardDeviation = "standard-deviation";

    /// <summary>Slope, kelvin per hour.</summary>
    public const string Slope = "slope";

    /// <summary>Number of means that the value rests on.</summary>
    public const string MeanCount = "mean-count";

    /// <summary>Number of raw readings that the value rests on.</summary>
    public const string ReadingCount = "reading-count";

    /// <summary>Number of readings left out because they had no value or the sensor cannot give it.</summary>
    public const string LeftOutCount = "left-out-count";

    /// <summary>Number of readings outside the range of the certificate.</summary>
    public const string OutsideCertificateCount = "outside-certificate-count";

    /// <summary>Width of the guard band.</summary>
    public const string GuardBand = "guard-band";
}
