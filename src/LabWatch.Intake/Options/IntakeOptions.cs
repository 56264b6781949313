using LabWatch.Intake.Payloads;
using LabWatch.Lab;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Options;

/// <summary>How readings come in. At least one of the two brokers must be set.</summary>
public sealed record IntakeOptions
{
    /// <summary>First level or levels of all topics. Default <c>lab</c>.</summary>
    public string Root { get; init; } = "lab";

    /// <summary>First level or levels of the topics that the service publishes, apart from <see cref="Root"/>. Default <c>lab-out</c>.</summary>
    public string OutRoot { get; init; } = "lab-out";

    /// <summary>What tells this installation from others at a broker, 1 to 64 letters, digits, hyphens; it must stay the same over restarts.</summary>
    public required string InstallationId { get; init; }

    /// <summary>Directory of the spool, on a local disk.</summary>
    public required string SpoolDirectory { get; init; }

    /// <summary>The broker outside; null where there is none.</summary>
    public ExternalBrokerOptions? ExternalBroker { get; init; }

    /// <summary>The broker inside this process; null where it does not run.</summary>
    public EmbeddedBrokerOptions? EmbeddedBroker { get; init; }

    /// <summary>Bounds on one message.</summary>
    public PayloadLimits Payload { get; init; } = new();

    /// <summary>Topics whose JSON is no SenML, and how it becomes readings. Default none.</summary>
    public IReadOnlyList<MappingOptions> Mappings { get; init; } = [];

    /// <summary>How device times are judged.</summary>
    public ReadingTimeRule Times { get; init; } = new();

    /// <summary>How long the store may take before messages go to the spool, 50 ms to 10 s. Default 1 s.</summary>
    public TimeSpan StoreDeadline { get; init; } = TimeSpan.FromSeconds(1);

    /// <summary>Most bytes of the spool, 1 MiB to 1 TiB. Default 256 MiB.</summary>
    public long SpoolLimitBytes { get; init; } = 256L << 20;

    /// <summary>Bytes after which the spool begins another file, 64 KiB to 64 MiB. Default 4 MiB.</summary>
    public long SpoolFileBytes { get; init; } = 4L << 20;

    /// <summary>Most messages between decoding and committing, 100 to 1000000. Default 20000.</summary>
    public int QueueLimit { get; init; } = 20_000;

    /// <summary>Most payload bytes between decoding and committing, 1 MiB to 4 GiB. Default 64 MiB.</summary>
    public long QueueLimitBytes { get; init; } = 64L << 20;

    /// <summary>Folder of files that hold one secret each; null where secrets come from the environment alone.</summary>
    public string? SecretsDirectory { get; init; }

    /// <summary>File of the accounts of devices at the embedded broker; null where there are none.</summary>
    public string? DeviceAccountsFile { get; init; }

    /// <summary>How long stopping may take, 0 s to 5 minutes. Default 10 s.</summary>
    public TimeSpan StopBudget { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>Everything wrong with these options, at once.</summary>
    public IReadOnlyList<Finding> Validate() =>
    [
        .. ValidateNames(),
        .. OptionCheck.Must(
            ExternalBroker is not null || EmbeddedBroker is not null, nameof(EmbeddedBroker), "No broker is set.", null, $"Set {nameof(ExternalBroker)}, {nameof(EmbeddedBroker)}, or both."),
        .. ExternalBroker?.Validate(nameof(ExternalBroker)) ?? [],
        .. EmbeddedBroker?.Validate(nameof(EmbeddedBroker)) ?? [],
        .. Payload.Validate(nameof(Payload)),
        .. Mappings.SelectMany((mapping, index) => mapping.Validate(FormattableString.Invariant($"{nameof(Mappings)}.{index}"))),
        .. Times.Validate(nameof(Times)),
        .. OptionCheck.Range(nameof(StoreDeadline), StoreDeadline, TimeSpan.FromMilliseconds(50), TimeSpan.FromSeconds(10)),
        .. OptionCheck.Range(nameof(SpoolLimitBytes), SpoolLimitBytes, 1L << 20, 1L << 40),
        .. OptionCheck.Range(nameof(SpoolFileBytes), SpoolFileBytes, 64L << 10, 64L << 20),
        .. OptionCheck.Range(nameof(QueueLimit), QueueLimit, 100, 1_000_000),
        .. OptionCheck.Range(nameof(QueueLimitBytes), QueueLimitBytes, Math.Max(1L << 20, Payload.MaximumBytes), 4L << 30),
        .. OptionCheck.Range(nameof(StopBudget), StopBudget, TimeSpan.Zero, TimeSpan.FromMinutes(5)),
    ];

    /// <summary>What in these options does not fit a lab file.</summary>
    public IEnumerable<Finding> CheckAgainst(LabSnapshot lab) => Payloads.Mapped.MappingTable.Check(Mappings, lab);

    private IEnumerable<Finding> ValidateNames() =>
    [
        .. OptionCheck.Must(
            Root.Length is > 0 and <= 200 && Root.Split('/').All(IsLevel), nameof(Root), "The root must be one or more levels of letters, digits, hyphens and underscores.", Root, "Set it to lab or leave it out."),
        .. OptionCheck.Must(
            OutRoot.Length is > 0 and <= 200 && OutRoot.Split('/').All(IsLevel) && !IsWithin(OutRoot, Root) && !IsWithin(Root, OutRoot), nameof(OutRoot), "The root of what is published must be levels of letters, digits, hyphens and underscores, and neither may lie in the other.", OutRoot, "Set it to lab-out or leave it out."),
        .. OptionCheck.Must(
            InstallationId.Length is > 0 and <= 64 && InstallationId.All(character => char.IsAsciiLetterOrDigit(character) || character == '-'), nameof(InstallationId), "The id must be 1 to 64 letters, digits and hyphens.", InstallationId, "Give this installation an id of its own."),
        .. OptionCheck.Must(
            Path.IsPathFullyQualified(SpoolDirectory), nameof(SpoolDirectory), "The path must be absolute.", SpoolDirectory, "Set a directory on a local disk."),
        .. OptionCheck.Must(
            DeviceAccountsFile is null || Path.IsPathFullyQualified(DeviceAccountsFile), nameof(DeviceAccountsFile), "The path must be absolute.", DeviceAccountsFile, "Set a file that the service's account alone may read."),
        .. OptionCheck.Must(
            EmbeddedBroker?.RequireAccounts != true || DeviceAccountsFile is not null, nameof(DeviceAccountsFile), "Accounts are required and there is no file for them.", null, "Set the file."),
        .. OptionCheck.Must(
            SecretsDirectory is null || Path.IsPathFullyQualified(SecretsDirectory), nameof(SecretsDirectory), "The path must be absolute.", SecretsDirectory, "Set the folder that holds the secrets."),
    ];

    private static bool IsWithin(string topic, string root) => (topic + "/").StartsWith(root + "/", StringComparison.Ordinal);

    private static bool IsLevel(string level) =>
        level.Length > 0 && level.All(character => char.IsAsciiLetterOrDigit(character) || character is '-' or '_');
}
