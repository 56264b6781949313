using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Simulator.Faults;

namespace LabWatch.Service.Api.Demo;

/// <summary>Makes an order for the simulation from a request; what only the simulation can judge it judges itself.</summary>
internal static class FaultOrders
{
    private const double LongestSeconds = 366 * 86_400.0;

    /// <summary>The order, or everything that is wrong with the request.</summary>
    public static (FaultOrder? Order, IReadOnlyList<Finding> Findings) Read(FaultRequest request)
    {
        List<Finding> findings = [];
        FaultTraits? traits = FaultCatalogue.Find(request.Kind ?? string.Empty);
        if (traits is null)
        {
            findings.Add(new Finding(
                "unknown-kind", "/kind", "There is no such kind of fault.", Finding.Quote(request.Kind), "Use one of: " + string.Join(", ", FaultCatalogue.All.Select(kind => kind.Name)) + "."));
        }

        if (!SourceKey.TryParse(request.Source, out SourceKey source))
        {
            findings.Add(new Finding("not-a-source", "/source", "This is not the key of a source.", Finding.Quote(request.Source), "Write site.source, for example hollin-vale.fir."));
        }

        CheckSeconds(findings, "/onsetSeconds", request.OnsetSeconds, 0);
        CheckSeconds(findings, "/durationSeconds", request.DurationSeconds, 1);
        return findings.Count > 0
            ? (null, findings)
            : (new FaultOrder(source.Source, traits!.Kind)
            {
                Channel = string.IsNullOrEmpty(request.Channel) ? null : request.Channel,
                Size = request.Size,
                Onset = TimeSpan.FromSeconds(request.OnsetSeconds ?? 0),
                Duration = request.DurationSeconds is { } seconds ? TimeSpan.FromSeconds(seconds) : null,
            }, []);
    }

    private static void CheckSeconds(List<Finding> findings, string where, double? seconds, double least)
    {
        if (seconds is { } given && !(given >= least && given <= LongestSeconds))
        {
            findings.Add(new Finding(
                "out-of-range", where, "The time is too short or too long.", FormattableString.Invariant($"{given}"), FormattableString.Invariant($"Give {least} to {LongestSeconds} seconds, or nothing.")));
        }
    }
}
