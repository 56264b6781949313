using LabWatch.Intake.Pipeline;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>The way back to a device whose acknowledgement waits for the commit.</summary>
internal sealed class AwaitedDelivery : IDelivery
{
    private readonly TaskCompletionSource<DeliveryOutcome> _outcome = new(TaskCreationOptions.RunContinuationsAsynchronously);

    public Task<DeliveryOutcome> Outcome => _outcome.Task;

    /// <inheritdoc/>
    public void Complete(DeliveryOutcome outcome) => _outcome.TrySetResult(outcome);
}
