using LabWatch.Lab.Time;

namespace LabWatch.Lab.Alerts;

/// <summary>Why nobody is told of an alert for a while: shelved by somebody until an end, or out of service until somebody puts it back (IEC 62682). Never of a hazard.</summary>
/// <param name="By">Who decided it.</param>
/// <param name="At">When.</param>
/// <param name="Until">When it ends by itself; null for out of service.</param>
/// <param name="Reason">Why.</param>
public sealed record AlertShelf(string By, Instant At, Instant? Until, string Reason)
{
    /// <summary>Whether it is out of service, and not shelved.</summary>
    public bool IsOutOfService => Until is null;
}
