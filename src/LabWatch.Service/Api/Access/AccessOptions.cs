using LabWatch.Lab.Findings;

namespace LabWatch.Service.Api.Access;

/// <summary>How long somebody stays signed in. Why these times: docs/decisions/0202.</summary>
internal sealed record AccessOptions
{
    /// <summary>A session that nobody uses ends after this time, 5 min to 30 d. An open page uses it.</summary>
    public TimeSpan IdleTime { get; init; } = TimeSpan.FromHours(12);

    /// <summary>A session ends after this time in any case, 1 h to 30 d.</summary>
    public TimeSpan LongestSession { get; init; } = TimeSpan.FromDays(30);

    /// <summary>Before a change the password must have been entered within this time, 5 min to 24 h.</summary>
    public TimeSpan ConfirmChangesWithin { get; init; } = TimeSpan.FromHours(12);

    /// <summary>Before a change of accounts or tokens the password must have been entered within this time, 1 min to 24 h.</summary>
    public TimeSpan ConfirmAdministrationWithin { get; init; } = TimeSpan.FromHours(1);

    /// <summary>Everything that is wrong with the options.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        Check(findings, nameof(IdleTime), IdleTime, TimeSpan.FromMinutes(5), TimeSpan.FromDays(30));
        Check(findings, nameof(LongestSession), LongestSession, TimeSpan.FromHours(1), TimeSpan.FromDays(30));
        Check(findings, nameof(ConfirmChangesWithin), ConfirmChangesWithin, TimeSpan.FromMinutes(5), TimeSpan.FromHours(24));
        Check(findings, nameof(ConfirmAdministrationWithin), ConfirmAdministrationWithin, TimeSpan.FromMinutes(1), TimeSpan.FromHours(24));
        return findings;
    }

    private static void Check(List<Finding> findings, string name, TimeSpan value, TimeSpan least, TimeSpan most)
    {
        if (value < least || value > most)
        {
            findings.Add(new Finding("out-of-range", name, "The time is out of range.", value.ToString("c"), $"Give a time from {least:c} to {most:c}."));
        }
    }
}
