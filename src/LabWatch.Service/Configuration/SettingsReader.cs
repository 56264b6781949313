using LabWatch.Alerts;
using LabWatch.Assessments;
using LabWatch.Intake.Options;
using LabWatch.Lab.Findings;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Web;

namespace LabWatch.Service.Configuration;

/// <summary>
/// Reads the options of every room from a JSON file and from environment variables (<c>LABWATCH__Section__Name</c>, which go before the
/// file), and validates them all at once.
/// </summary>
internal static class SettingsReader
{
    private const string Prefix = "LABWATCH__";
    private static readonly string[] Sections = ["Intake", "Readings", "Records", "Assessments", "Alerts", "Access", "Web", "Logging"];

    /// <summary>The configuration of a file (none where null) and of the environment.</summary>
    public static (IConfigurationRoot? Configuration, IReadOnlyList<Finding> Findings) Load(string? file)
    {
        ConfigurationBuilder builder = new();
        if (file is not null)
        {
            builder.AddJsonFile(Path.GetFullPath(file), optional: false);
        }

        builder.AddEnvironmentVariables(Prefix);
        try
        {
            return (builder.Build(), []);
        }
        catch (Exception exception) when (exception is IOException or InvalidDataException or FormatException)
        {
            string reason = exception.InnerException?.Message ?? exception.Message;
            return (null, [new Finding("options-unreadable", "--config", "The file of options cannot be read: " + reason, file, "Correct the file; it is JSON with one member a section.")]);
        }
    }

    /// <summary>All options for a data directory, and everything that is wrong with them.</summary>
    /// <param name="configuration">What was configured.</param>
    /// <param name="dataDirectory">Absolute path of the data directory.</param>
    /// <param name="installationId">What tells this installation from others at a broker.</param>
    public static (ServiceSettings Settings, IReadOnlyList<Finding> Findings) Read(IConfigurationRoot configuration, string dataDirectory, string installationId)
    {
        List<Finding> findings = [];
        foreach (IConfigurationSection section in configuration.GetChildren().Where(section => !Sections.Contains(section.Key, StringComparer.OrdinalIgnoreCase)))
        {
            findings.Add(new Finding("unknown-option", section.Path, "This section is not known.", Finding.Quote(section.Value), $"Remove it or use one of: {string.Join(", ", Sections)}."));
        }

        string secrets = Path.Combine(dataDirectory, "secrets");
        IntakeOptions intake = Bound(configuration, "Intake", new IntakeOptions { InstallationId = installationId, SpoolDirectory = Path.Combine(dataDirectory, "spool"), SecretsDirectory = secrets, DeviceAccountsFile = Path.Combine(dataDirectory, "keys", "devices.json") }, findings);
        if (intake.ExternalBroker is null && intake.EmbeddedBroker is null)
        {
            intake = intake with { EmbeddedBroker = new EmbeddedBrokerOptions() };
        }

        ServiceSettings settings = new(
            intake,
            Bound(configuration, "Readings", new ReadingsOptions { DataDirectory = dataDirectory, SecretsDirectory = secrets }, findings),
            Bound(configuration, "Records", RecordsOptions.InDirectory(dataDirectory), findings),
            Bound(configuration, "Assessments", new AssessmentsOptions { TraceDirectory = Path.Combine(dataDirectory, "cavities") }, findings),
            Bound(configuration, "Alerts", new AlertsOptions { DataDirectory = dataDirectory, SecretsDirectory = secrets }, findings),
            Bound(configuration, "Access", new AccessOptions(), findings),
            Bound(configuration, "Web", new WebOptions(), findings));
        findings.AddRange(Named("Intake", settings.Intake.Validate()));
        findings.AddRange(Named("Readings", settings.Readings.Validate()));
        findings.AddRange(Named("Records", settings.Records.Validate()));
        findings.AddRange(Named("Assessments", settings.Assessments.Validate()));
        findings.AddRange(Named("Alerts", settings.Alerts.Validate()));
        findings.AddRange(Named("Access", settings.Access.Validate()));
        findings.AddRange(Named("Web", settings.Web.Validate()));
        return (settings, findings);
    }

    private static T Bound<T>(IConfigurationRoot configuration, string section, T options, List<Finding> findings)
        where T : class
    {
        OptionBinder.Bind(configuration.GetSection(section), options, findings);
        return options;
    }

    private static IEnumerable<Finding> Named(string section, IEnumerable<Finding> findings) =>
        findings.Select(finding => finding.Where.StartsWith(section, StringComparison.Ordinal) ? finding : finding with { Where = $"{section}:{finding.Where.Replace('.', ':')}" });
}
