using System.Globalization;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;

namespace LabWatch.Service.Api.Health;

/// <summary>Reads from the records.</summary>
internal sealed class RecordsCheck(IAlertLedger alerts, IAssessmentLedger assessments) : IDependencyCheck
{
    /// <inheritdoc/>
    public string Part => "records";

    /// <inheritdoc/>
    public async ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken)
    {
        int open = (await alerts.OpenAsync(cancellationToken).ConfigureAwait(false)).Count;
        await assessments.FindAsync("0", cancellationToken).ConfigureAwait(false);
        return new DependencyAnswer(true, string.Create(CultureInfo.InvariantCulture, $"They answer; {open} alerts are open."));
    }
}
