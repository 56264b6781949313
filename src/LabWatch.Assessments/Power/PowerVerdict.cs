namespace LabWatch.Assessments.Power;

/// <summary>How soon a shift that would reach the limit is found.</summary>
public enum PowerVerdict
{
    /// <summary>Too few days to know the noise.</summary>
    TooFewDays,

    /// <summary>No limit applies.</summary>
    NoLimit,

    /// <summary>At the next check.</summary>
    SeenAtOnce,

    /// <summary>Within five checks.</summary>
    SeenWithinFive,

    /// <summary>Within twenty checks.</summary>
    SeenWithinTwenty,

    /// <summary>Not within twenty checks.</summary>
    CannotBeSeen,
}
