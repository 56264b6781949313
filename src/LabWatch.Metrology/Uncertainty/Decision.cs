namespace LabWatch.Metrology.Uncertainty;

/// <summary>Outcome of a comparison with a limit, in the words of ILAC-G8:09/2019.</summary>
public enum Decision
{
    /// <summary>No decision could be taken; the explanation says why.</summary>
    NotDecided,

    /// <summary>Inside the limit, guard band respected.</summary>
    Pass,

    /// <summary>Inside the limit, but within the guard band.</summary>
    ConditionalPass,

    /// <summary>Outside the limit, but within the guard band.</summary>
    ConditionalFail,

    /// <summary>Outside the limit, guard band respected.</summary>
    Fail,
}
