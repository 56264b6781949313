using System.Globalization;
using LabWatch.Alerts.Mail;
using LabWatch.Lab.Findings;

namespace LabWatch.Alerts;

/// <summary>Settings of hazard watch, alerts and notifiers. Every duration is positive unless said otherwise.</summary>
public sealed record AlertsOptions
{
    /// <summary>Folder of the service's own data; the alert journal and the list of last-heard hazard channels lie in it.</summary>
    public required string DataDirectory { get; init; }

    /// <summary>Folder with one file a secret, the file named like the secret; null for none. Environment variables are looked at besides.</summary>
    public string? SecretsDirectory { get; init; }

    /// <summary>How far a surface must fall below its limit before the alert can return, kelvin, 0 or more. Default 2.</summary>
    public double HotSurfaceDeadBandKelvin { get; init; } = 2;

    /// <summary>How long a surface must read at or above its limit before the alert is raised. Default 0: the first valid reading raises.</summary>
    public TimeSpan HotSurfaceOnDelay { get; init; } = TimeSpan.Zero;

    /// <summary>How long a surface must read below its limit less the dead-band before the alert returns; 0 or more. Default 30 s.</summary>
    public TimeSpan HotSurfaceOffDelay { get; init; } = TimeSpan.FromSeconds(30);

    /// <summary>A hazard channel is silent when it has sent nothing valid for this many of its intervals. Default 5, at least 2.</summary>
    public double SilenceIntervals { get; init; } = 5;

    /// <summary>The shortest silence that is called one. Default 10 s.</summary>
    public TimeSpan SilenceMinimum { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>
    /// How long after a start no silence is raised, so that devices can connect; the silence itself is counted from the last reading before
    /// the stop. Default 15 s; 0 or more.
    /// </summary>
    public TimeSpan StartGrace { get; init; } = TimeSpan.FromSeconds(15);

    /// <summary>Readings older than this by device time say nothing about the present: they only end a silence. Default 60 s.</summary>
    public TimeSpan OldestReading { get; init; } = TimeSpan.FromSeconds(60);

    /// <summary>
    /// How long a step waits for the local disk before it is told all the same; it is made durable as soon as the disk answers. Default 25 ms:
    /// a slow disk delays no hazard, and what a loss of power then forgets is raised again by the next reading.
    /// </summary>
    public TimeSpan JournalPatience { get; init; } = TimeSpan.FromMilliseconds(25);

    /// <summary>How often new assessments are looked for. Default 2 s.</summary>
    public TimeSpan AssessmentPoll { get; init; } = TimeSpan.FromSeconds(2);

    /// <summary>How many lengths of its window an assessment may lie back and still raise an alert. Default 2.</summary>
    public double OldestAssessmentWindows { get; init; } = 2;

    /// <summary>Time allowed for one attempt of a webhook, answer included. Default 10 s.</summary>
    public TimeSpan WebhookTimeout { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>Wait before the second attempt; doubled for each further one. Default 2 s.</summary>
    public TimeSpan RetryFirst { get; init; } = TimeSpan.FromSeconds(2);

    /// <summary>Longest wait between attempts, a receiver's Retry-After included. Default 5 min.</summary>
    public TimeSpan RetryLongest { get; init; } = TimeSpan.FromMinutes(5);

    /// <summary>A message that could not be delivered for this long is given up, and that is said. Default 24 h.</summary>
    public TimeSpan GiveUpAfter { get; init; } = TimeSpan.FromHours(24);

    /// <summary>Attempts under way at the same time to one notifier. Default 4, 1 to 64.</summary>
    public int ParallelAttempts { get; init; } = 4;

    /// <summary>
    /// What follows within this time on the same thing at the same source is told by summary, and people get one summary in this time at most;
    /// 0 tells everything at once. Default 60 s.
    /// </summary>
    public TimeSpan GroupWindow { get; init; } = TimeSpan.FromSeconds(60);

    /// <summary>Longest time for which somebody may shelve an alert. Default 24 h.</summary>
    public TimeSpan ShelfLongest { get; init; } = TimeSpan.FromHours(24);

    /// <summary>How long no reading of any source may arrive before people are told. Default 5 min.</summary>
    public TimeSpan NoReadingsAfter { get; init; } = TimeSpan.FromMinutes(5);

    /// <summary>Address of a monitor that gets a heartbeat, https (or http to this machine); null for none.</summary>
    public string? HeartbeatAddress { get; init; }

    /// <summary>How often the monitor gets it. Default 60 s.</summary>
    public TimeSpan HeartbeatInterval { get; init; } = TimeSpan.FromSeconds(60);

    /// <summary>How long a receiver that failed five times in a row is left alone before one attempt tests whether it is back. Default 30 s.</summary>
    public TimeSpan CircuitRest { get; init; } = TimeSpan.FromSeconds(30);

    /// <summary>Address under which people reach the pages, https, for links in messages; null for messages without links.</summary>
    public string? PublicAddress { get; init; }

    /// <summary>How long a link in a message leads to its alert. Default 24 h.</summary>
    public TimeSpan LinkLife { get; init; } = TimeSpan.FromHours(24);

    /// <summary>Name of the mail server; null for none.</summary>
    public string? MailHost { get; init; }

    /// <summary>Port of the mail server. Default 587, submission (RFC 6409).</summary>
    public int MailPort { get; init; } = 587;

    /// <summary>How the connection to the mail server is made private. Default STARTTLS, demanded.</summary>
    public MailSecurity MailSecurity { get; init; } = MailSecurity.StartTls;

    /// <summary>Address that mails come from; also the user where no other is named.</summary>
    public string? MailFrom { get; init; }

    /// <summary>User at the mail server; null for the address that mails come from.</summary>
    public string? MailUser { get; init; }

    /// <summary>Name of the secret with the user's password; null to send without signing in.</summary>
    public string? MailSecretName { get; init; }

    /// <summary>Time allowed for one mail, connection included. Default 30 s.</summary>
    public TimeSpan MailTimeout { get; init; } = TimeSpan.FromSeconds(30);

    /// <summary>Whom a push service may ask about this installation: a mailto or https address; null for the sender of mails or the public address.</summary>
    public string? PushContact { get; init; }

    /// <summary>Whether push messages may go to a plain http address of this machine. Default false.</summary>
    public bool PushToLoopback { get; init; }

    /// <summary>The contact that push services are told.</summary>
    internal string PushContactOrDefault =>
        PushContact ?? (MailFrom is { } from ? "mailto:" + from : PublicAddress is { } address && address.StartsWith("https:", StringComparison.Ordinal) ? address : "mailto:labwatch@localhost");

    /// <summary>Everything wrong with these settings.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        if (string.IsNullOrWhiteSpace(DataDirectory))
        {
            findings.Add(new Finding("missing", nameof(DataDirectory), "No folder is given for the alert journal.", null, "Name a folder on a local disk."));
        }

        Check(findings, nameof(HotSurfaceDeadBandKelvin), HotSurfaceDeadBandKelvin, 0, 50, "K");
        Check(findings, nameof(HotSurfaceOnDelay), HotSurfaceOnDelay.TotalSeconds, 0, 60, "s");
        Check(findings, nameof(HotSurfaceOffDelay), HotSurfaceOffDelay.TotalSeconds, 0, 3600, "s");
        Check(findings, nameof(SilenceIntervals), SilenceIntervals, 2, 100, "intervals");
        Check(findings, nameof(SilenceMinimum), SilenceMinimum.TotalSeconds, 0.1, 600, "s");
        Check(findings, nameof(StartGrace), StartGrace.TotalSeconds, 0, 600, "s");
        Check(findings, nameof(OldestReading), OldestReading.TotalSeconds, 5, 600, "s");
        Check(findings, nameof(JournalPatience), JournalPatience.TotalSeconds, 0.001, 10, "s");
        Check(findings, nameof(AssessmentPoll), AssessmentPoll.TotalSeconds, 0.05, 600, "s");
        Check(findings, nameof(OldestAssessmentWindows), OldestAssessmentWindows, 1, 100, "windows");
        Check(findings, nameof(WebhookTimeout), WebhookTimeout.TotalSeconds, 0.1, 120, "s");
        Check(findings, nameof(RetryFirst), RetryFirst.TotalSeconds, 0.01, 600, "s");
        Check(findings, nameof(RetryLongest), RetryLongest.TotalSeconds, RetryFirst.TotalSeconds, 3600, "s");
        Check(findings, nameof(NoReadingsAfter), NoReadingsAfter.TotalSeconds, 10, 86_400, "s");
        Check(findings, nameof(HeartbeatInterval), HeartbeatInterval.TotalSeconds, 10, 86_400, "s");
        Check(findings, nameof(GroupWindow), GroupWindow.TotalSeconds, 0, 600, "s");
        Check(findings, nameof(ShelfLongest), ShelfLongest.TotalSeconds, 60, 7 * 86_400d, "s");
        Check(findings, nameof(CircuitRest), CircuitRest.TotalSeconds, 1, 600, "s");
        Check(findings, nameof(LinkLife), LinkLife.TotalSeconds, 60, 30 * 86_400d, "s");
        Check(findings, nameof(MailPort), MailPort, 1, 65_535, "(a port)");
        Check(findings, nameof(MailTimeout), MailTimeout.TotalSeconds, 1, 300, "s");
        CheckAddresses(findings);
        Check(findings, nameof(GiveUpAfter), GiveUpAfter.TotalSeconds, 60, 30 * 86_400d, "s");
        Check(findings, nameof(ParallelAttempts), ParallelAttempts, 1, 64, "attempts");
        return findings;
    }

    private void CheckAddresses(List<Finding> findings)
    {
        bool isAddress = Uri.TryCreate(PublicAddress, UriKind.Absolute, out Uri? address) && (address.Scheme == Uri.UriSchemeHttps || address.Scheme == Uri.UriSchemeHttp);
        if (PublicAddress is not null && !isAddress)
        {
            findings.Add(new Finding("bad-address", nameof(PublicAddress), "This is no address of a page.", Finding.Quote(PublicAddress), "Write it in full, for example https://labwatch.laboratory.example."));
        }

        bool isMonitor = Uri.TryCreate(HeartbeatAddress, UriKind.Absolute, out Uri? monitor)
            && (monitor.Scheme == Uri.UriSchemeHttps || (monitor.Scheme == Uri.UriSchemeHttp && monitor.IsLoopback));
        if (HeartbeatAddress is not null && !isMonitor)
        {
            findings.Add(new Finding("bad-address", nameof(HeartbeatAddress), "This is no https address of a monitor.", Finding.Quote(HeartbeatAddress), "Write it in full, for example https://monitor.laboratory.example/labwatch."));
        }

        if (MailHost is not null && (MailFrom is null || !MimeKit.MailboxAddress.TryParse(MailFrom, out _)))
        {
            findings.Add(new Finding("bad-address", nameof(MailFrom), "A mail server needs an address that mails come from.", Finding.Quote(MailFrom), "Write one mailbox, for example labwatch@laboratory.example."));
        }

        if (MailHost is not null && MailSecurity == MailSecurity.None && MailHost is not ("localhost" or "127.0.0.1" or "::1"))
        {
            findings.Add(new Finding("not-private", nameof(MailSecurity), "Mails to another machine would go in the clear.", MailHost, "Use StartTls or Tls."));
        }

        if (PushContact is not null && !PushContact.StartsWith("mailto:", StringComparison.Ordinal) && !PushContact.StartsWith("https:", StringComparison.Ordinal))
        {
            findings.Add(new Finding("bad-address", nameof(PushContact), "A push service is told a mailto or https address.", Finding.Quote(PushContact), "Write for example mailto:duty@laboratory.example."));
        }
    }

    private static void Check(List<Finding> findings, string name, double value, double lowest, double highest, string unit)
    {
        if (!(value >= lowest && value <= highest))
        {
            findings.Add(new Finding(
                "out-of-range", name, "The value is outside its range.", value.ToString(CultureInfo.InvariantCulture),
                string.Create(CultureInfo.InvariantCulture, $"Use {lowest} to {highest} {unit}.")));
        }
    }
}
