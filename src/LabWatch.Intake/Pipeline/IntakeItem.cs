using LabWatch.Intake.Spool;

namespace LabWatch.Intake.Pipeline;

/// <summary>One accepted message on its way to the store.</summary>
/// <param name="Entry">What has to be made durable; both parts null where the message held nothing.</param>
/// <param name="Delivery">The way back to the sender.</param>
/// <param name="Bytes">Length of its payload, for the bound of the queue.</param>
internal sealed record IntakeItem(SpoolEntry Entry, IDelivery Delivery, long Bytes)
{
    public int ReadingCount => Entry.Pack?.Readings.Count ?? 0;
}
