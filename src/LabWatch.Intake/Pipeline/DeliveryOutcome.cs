namespace LabWatch.Intake.Pipeline;

/// <summary>What became of a message that was handed to the pipeline.</summary>
internal enum DeliveryOutcome
{
    /// <summary>All of it survives a crash: readings in the store or the spool, refusals in quarantine or the spool.</summary>
    Durable,

    /// <summary>The service stops before it was made durable; the sender has to send it again.</summary>
    Abandoned,
}
