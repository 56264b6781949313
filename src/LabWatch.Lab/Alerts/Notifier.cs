namespace LabWatch.Lab.Alerts;

/// <summary>A configured way to tell somebody about alerts.</summary>
/// <param name="Id">Id in the site (a slug).</param>
/// <param name="Kind">The way it works.</param>
/// <param name="Address">Where to send to (an absolute http or https address for a webhook, a mailto address for mail); null for the log.</param>
/// <param name="SecretName">Name of the secret that signs the messages; null for none. The secret itself never stands here.</param>
public sealed record Notifier(string Id, NotifierKind Kind, Uri? Address, string? SecretName);
