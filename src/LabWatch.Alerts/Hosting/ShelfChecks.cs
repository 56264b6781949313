using System.Globalization;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;

namespace LabWatch.Alerts.Hosting;

/// <summary>What keeps an alert from being shelved or taken out of service.</summary>
internal static class ShelfChecks
{
    private const int LongestReason = 1000;
    private static readonly TimeSpan Shortest = TimeSpan.FromMinutes(1);

    /// <summary>Everything that is wrong.</summary>
    /// <param name="alert">The open alert; null where there is none.</param>
    /// <param name="length">For how long; null for out of service.</param>
    /// <param name="reason">Why.</param>
    /// <param name="longest">The longest permitted time.</param>
    public static IEnumerable<Finding> Of(Alert? alert, TimeSpan? length, string? reason, TimeSpan longest)
    {
        if (alert?.IsHazard == true)
        {
            yield return new Finding(
                "hazard-not-shelved", "id", "A hazard is never shelved or taken out of service.", alert.Code, "Remove the hazard; a sensor that is gone is taken out of the lab file, which says so.");
        }

        if (alert?.Shelf is { } shelf)
        {
            yield return new Finding("shelved-already", "id", $"{shelf.By} has done so already.", alert.Id.ToString(), "End that first.");
        }

        if (string.IsNullOrWhiteSpace(reason) || reason.Length > LongestReason)
        {
            yield return new Finding(
                "reason-missing", "/reason", "It needs a reason.", Finding.Quote(reason), string.Create(CultureInfo.InvariantCulture, $"Give 1 to {LongestReason} characters."));
        }

        if (length is { } time && (time < Shortest || time > longest))
        {
            yield return new Finding(
                "out-of-range", "/minutes", "The time is too short or too long.", time.TotalMinutes.ToString(CultureInfo.InvariantCulture),
                string.Create(CultureInfo.InvariantCulture, $"Give 1 to {longest.TotalMinutes:0} minutes."));
        }
    }
}
