using System.Globalization;
using LabWatch.Alerts;

namespace LabWatch.Service.Api.Health;

/// <summary>Looks whether hazards are watched and what happens to them becomes durable.</summary>
internal sealed class AlertsCheck(IAlertBoard board) : IDependencyCheck
{
    private const int MostWaiting = 1_000;

    /// <inheritdoc/>
    public string Part => "alerts";

    /// <inheritdoc/>
    public ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken)
    {
        if (board.JournalFailing)
        {
            return new(new DependencyAnswer(false, "The alert journal cannot be written: alerts are raised, but a restart would forget them."));
        }

        string limits = string.Join(' ', board.Findings.Select(finding => finding.ToString()));
        string waiting = string.Create(CultureInfo.InvariantCulture, $"{board.View().Open.Count} open; {board.WaitingForLedger} steps wait for the records. ");
        return new(new DependencyAnswer(board.WaitingForLedger < MostWaiting, (waiting + limits).TrimEnd()));
    }
}
