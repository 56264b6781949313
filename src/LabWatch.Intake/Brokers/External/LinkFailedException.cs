namespace LabWatch.Intake.Brokers.External;

/// <summary>The broker refused a connection or a subscription; the message says why.</summary>
internal sealed class LinkFailedException(string message) : IOException(message);
