namespace LabWatch.Metrology.Attribution;

/// <summary>What an attribution may say.</summary>
public enum AttributionVerdict
{
    /// <summary>The deviations are as large as chance makes them.</summary>
    NothingToExplain,

    /// <summary>One explanation is far more probable than all others.</summary>
    Explained,

    /// <summary>Something is there, and the bands cannot say which of some candidates it is.</summary>
    CannotBeToldApart,

    /// <summary>No explanation fits: something that is not among the candidates, or uncertainties that are too small.</summary>
    Unexplained,
}
