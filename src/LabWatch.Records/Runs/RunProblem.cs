namespace LabWatch.Records.Runs;

/// <summary>Why a step of a run was not recorded.</summary>
public enum RunProblem
{
    /// <summary>It was, or had been already.</summary>
    None,

    /// <summary>There is no such run.</summary>
    Missing,

    /// <summary>The source is in use by another run.</summary>
    SourceInUse,

    /// <summary>Somebody else has ended the run.</summary>
    EndedAlready,

    /// <summary>The run was cancelled; nothing more is recorded of it.</summary>
    Cancelled,

    /// <summary>The id or the request's key stands for something else.</summary>
    KeyReused,
}
