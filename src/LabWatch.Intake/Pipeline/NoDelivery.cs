
namespace LabWatch.Intake.Pipeline;

/// <summary>For messages that are not acknowledged (QoS 0).</summary>
internal sealed class NoDelivery : IDelivery
{
    public static NoDelivery Instance { get; } = new();

    /// <inheritdoc/>
    public void Complete(DeliveryOutcome outcome)
    {
    }
}
