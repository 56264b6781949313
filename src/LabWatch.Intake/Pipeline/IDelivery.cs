namespace LabWatch.Intake.Pipeline;

/// <summary>The way back to the sender of one message. Called once, in the order in which messages were accepted; must not block.</summary>
internal interface IDelivery
{
    /// <summary>Tells what became of the message.</summary>
    void Complete(DeliveryOutcome outcome);
}
