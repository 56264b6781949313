using System.Globalization;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Runs;

/// <summary>
/// When a run may start. A hazard that stands against the source is overridden by nobody, an invalid certificate not by a technician
/// (ISO/IEC 17025 6.4.4 and 6.5), everything else with a reason.
/// </summary>
internal static class RunRules
{
    /// <summary>A run at another set point than the controller's is not the one that readiness was judged for. Own convention.</summary>
    private const double SameSetPointKelvin = 1;

    private const string Ready = "ready";
    private const string CertificateReason = "certificate";
    private const string CertificateCure = "Have the quality manager look at it: a technician cannot override a certificate.";

    /// <summary>Why the run cannot start, and whether the caller is the one who may not; no findings where it can.</summary>
    public static (IReadOnlyList<Finding> Findings, bool IsForbidden) Refusal(LabSnapshot lab, ReferenceSource source, SourceStatusView status, CalibrationRun run, Caller caller)
    {
        Finding[] hazards = [.. status.Readiness.Reasons
            .Where(reason => reason.Blocks && HazardCode.IsHazard(reason.Code))
            .Select(reason => new Finding("hazard-blocks", "/source", reason.Text, reason.Code, "Deal with the hazard first; nobody can override it."))];
        if (hazards.Length > 0)
        {
            return (hazards, false);
        }

        Finding[] certificates = [.. Certificates(lab, source, run)];
        if (certificates.Length == 0)
        {
            // Of the other wells that a result rests on.
            certificates = [.. status.Readiness.Reasons
                .Where(reason => reason.Blocks && string.Equals(reason.Code, CertificateReason, StringComparison.Ordinal))
                .Select(reason => new Finding("certificate-invalid", "/source", reason.Text, reason.Code, CertificateCure))];
        }

        if (certificates.Length > 0 && !caller.May(Permission.ReviseRecords))
        {
            return (certificates, true);
        }

        Finding[] others = [.. certificates, .. NotReady(status, run)];
        return (others.Length > 0 && run.OverrideReason is null ? others : [], false);
    }

    private static IEnumerable<Finding> NotReady(SourceStatusView status, CalibrationRun run)
    {
        const string Cure = "Wait until it is ready, or give the reason for using it nevertheless as overrideReason.";
        if (status.SetPointCelsius is { } set && Math.Abs(set - run.SetPointCelsius) > SameSetPointKelvin)
        {
            yield return new Finding(
                "other-set-point", "/setPointCelsius", string.Create(CultureInfo.InvariantCulture, $"The controller is set to {set:0.##} degC, not to {run.SetPointCelsius:0.##} degC."),
                run.SetPointCelsius.ToString("R", CultureInfo.InvariantCulture), Cure);
        }

        if (!string.Equals(status.Readiness.State, Ready, StringComparison.Ordinal))
        {
            ReadinessReasonView[] reasons = [.. status.Readiness.Reasons.Where(reason => reason.Blocks)];
            foreach (ReadinessReasonView reason in reasons)
            {
                yield return new Finding("not-ready", "/source", reason.Text, reason.Code, Cure);
            }

            if (reasons.Length == 0)
            {
                yield return new Finding("not-ready", "/source", "The source is not ready.", status.Readiness.State, Cure);
            }
        }
    }

    private static IEnumerable<Finding> Certificates(LabSnapshot lab, ReferenceSource source, CalibrationRun run)
    {
        Channel? reference = source.ReferenceChannel ?? source.Channels.FirstOrDefault(channel => channel.Quantity == ChannelQuantity.ComparatorTemperature);
        Certificate? certificate = reference is null ? null : lab.CertificateInForce(reference.Key, run.StartedAt);
        if (certificate is null)
        {
            yield return new Finding("certificate-missing", "/source", "No certificate is in force for the source's reference thermometer.", reference?.Id, CertificateCure);
            yield break;
        }

        if (certificate.DueAt <= run.StartedAt)
        {
            yield return new Finding("certificate-overdue", "/source", $"Certificate {certificate.Number} has been overdue since {certificate.DueAt}.", certificate.Reference, CertificateCure);
        }

        if (!(run.SetPointCelsius >= certificate.MinimumCelsius && run.SetPointCelsius <= certificate.MaximumCelsius))
        {
            yield return new Finding(
                "certificate-range", "/setPointCelsius",
                string.Create(CultureInfo.InvariantCulture, $"Certificate {certificate.Number} covers {certificate.MinimumCelsius} to {certificate.MaximumCelsius} degC."), certificate.Reference, CertificateCure);
        }
    }
}
