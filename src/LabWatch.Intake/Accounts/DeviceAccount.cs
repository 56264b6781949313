using LabWatch.Lab.Time;

namespace LabWatch.Intake.Accounts;

/// <summary>An account with which a device publishes for one source at the embedded broker.</summary>
/// <param name="Name">Name of the account, a slug: the user name in MQTT. Never given again.</param>
/// <param name="Source">Key of the source, <c>site.source</c>.</param>
/// <param name="CreatedAt">When it was made.</param>
/// <param name="CreatedBy">Who made it.</param>
/// <param name="RevokedAt">When it was taken back; null while it is good.</param>
public sealed record DeviceAccount(string Name, string Source, Instant CreatedAt, string CreatedBy, Instant? RevokedAt);
