namespace LabWatch.Assessments.Recomputation;

/// <summary>How an assessment that was computed again compares with the one on record.</summary>
public enum Agreement
{
    /// <summary>Every number has the same bits, the decision and the words are the same.</summary>
    Identical,

    /// <summary>Every number agrees within <see cref="AssessmentComparison.RelativeTolerance"/> and the decision is the same: what another platform or version may give.</summary>
    Agrees,

    /// <summary>The same inputs give another number or another decision.</summary>
    Differs,

    /// <summary>It rests on other readings, certificates, limits or another description of the source than those on record now.</summary>
    InputsChanged,

    /// <summary>It cannot be computed again: its readings are no longer there, or the source does not have any more what it is about.</summary>
    NotPossible,
}
