using LabWatch.Intake.Options;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Secrets;
using LabWatch.Service.Configuration;
using LabWatch.Service.Web;

namespace LabWatch.Service.Hosting;

/// <summary>Validates everything that a start needs, and lists all findings at once.</summary>
internal static class StartPreparation
{
    /// <summary>Prepares a start.</summary>
    /// <param name="dataPath">The data directory.</param>
    /// <param name="configFile">File of options; null for none.</param>
    /// <param name="giveLab">Gives the lab file, or null for the one in force, once the data directory is there.</param>
    /// <param name="makeClock">Gives the clock, once the data directory is there.</param>
    /// <param name="urls">Where pages and API are served.</param>
    /// <param name="adapt">Changes the options that were read, for commands that fix some of them.</param>
    /// <param name="cancellationToken">Ends the wait for a records database.</param>
    public static async Task<(ServiceStart? Start, IReadOnlyList<Finding> Findings)> PrepareAsync(
        string dataPath,
        string? configFile,
        string urls,
        Func<DataDirectory, TimeProvider> makeClock,
        Func<DataDirectory, TimeProvider, (LabOrder? Order, Finding? Finding)> giveLab,
        Func<ServiceSettings, ServiceSettings>? adapt,
        CancellationToken cancellationToken)
    {
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(configFile);
        (DataDirectory? data, Finding? finding) = DataDirectory.Open(dataPath);
        if (configuration is null || data is null)
        {
            data?.Dispose();
            return (null, [.. unreadable, .. finding is null ? [] : new[] { finding }, .. UrlFindings(urls)]);
        }

        TimeProvider clock = makeClock(data);
        (ServiceSettings settings, IReadOnlyList<Finding> optionFindings) = SettingsReader.Read(configuration, data.Path, InstallationId.Of(data.Path));
        settings = adapt?.Invoke(settings) ?? settings;
        (CertificateKeeper? certificate, IReadOnlyList<Finding> webFindings) = WebFindings(urls, settings, data);
        (LabOrder? order, Finding? unreadableLab) = giveLab(data, clock);
        List<Finding> findings = [.. UrlFindings(urls), .. optionFindings, .. webFindings, .. PortFindings(settings), .. unreadableLab is null ? [] : new[] { unreadableLab }];
        (LabSnapshotSource? lab, IReadOnlyList<Finding> labFindings) = unreadableLab is not null || settings.Records.Validate().Count > 0
            ? (null, [])
            : await new LabStart(data.Path, settings.Records, clock).LoadAsync(order, lookOnly: findings.Count > 0, cancellationToken);
        findings.AddRange(labFindings);
        findings.AddRange(lab is null ? [] : settings.Intake.CheckAgainst(lab.Current));
        if (findings.Count > 0 || lab is null)
        {
            data.Dispose();
            return (null, findings);
        }

        lab.Keep();
        return (new ServiceStart(data, lab, settings, configuration, urls, clock, certificate), []);
    }

    private static (CertificateKeeper? Certificate, IReadOnlyList<Finding> Findings) WebFindings(string urls, ServiceSettings settings, DataDirectory data)
    {
        IReadOnlyList<Uri> addresses = WebAddresses.Parse(urls);
        Finding[] findings = [.. WebAddresses.Check(addresses, settings.Web)];
        EmbeddedBrokerOptions? secureBroker = settings.Intake.EmbeddedBroker is { Tls: true } broker ? broker : null;
        if (secureBroker is not null && settings.Web.Certificate is null)
        {
            findings = [.. findings, new Finding("certificate-missing", "Intake:EmbeddedBroker:Tls", "The embedded broker is to speak TLS and has no certificate.", null, "Set Web:Certificate to the word own, or to a file; pages and broker share it.")];
        }

        if (findings.Length > 0 || settings.Web.Certificate is null || (secureBroker is null && !addresses.Any(address => address.Scheme == Uri.UriSchemeHttps)))
        {
            return (null, findings);
        }

        NamedSecrets secrets = new(settings.Intake.SecretsDirectory, Environment.GetEnvironmentVariable);
        CertificateKeeper certificate = new(settings.Web, data.Keys, [.. addresses.Select(address => address.Host), .. settings.Web.HostNames, .. secureBroker is null ? [] : new[] { secureBroker.Address }], secrets, TimeProvider.System);
        return (certificate, certificate.Open());
    }

    private static IEnumerable<Finding> PortFindings(ServiceSettings settings) => settings.Intake.EmbeddedBroker is { } broker
        ? PortProbe.CheckBroker("Intake:EmbeddedBroker:Port", broker.Address, broker.Port)
        : [];

    private static IEnumerable<Finding> UrlFindings(string urls)
    {
        string[] all = urls.Split(';', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries);
        if (all.Length == 0)
        {
            return [BadAddress("No address is given.", urls)];
        }

        List<Finding> findings = [];
        List<Uri> usable = [];
        foreach (string url in all)
        {
            if (WebAddresses.Read(url) is { } parsed)
            {
                usable.Add(parsed);
            }
            else
            {
                findings.Add(BadAddress("This is not an http or https address.", url));
            }
        }

        return [.. findings, .. PortProbe.CheckUrls(usable)];
    }

    private static Finding BadAddress(string message, string value) =>
        new("bad-address", "--urls", message, Finding.Quote(value), $"Use for example {Commands.CommonOptions.DefaultUrls}.");
}
