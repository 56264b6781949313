using LabWatch.Lab.Findings;
using LabWatch.Service.Configuration;

namespace LabWatch.Service.Hosting;

/// <summary>Validates everything that a start needs, and lists all findings at once.</summary>
internal static class StartPreparation
{
    /// <summary>Prepares a start.</summary>
    /// <param name="dataPath">The data directory.</param>
    /// <param name="configFile">File of options; null for none.</param>
    /// <param name="loadLab">Gives the lab, once the data directory is there.</param>
    /// <param name="makeClock">Gives the clock, once the data directory is there.</param>
    /// <param name="urls">Where pages and API are served.</param>
    public static (ServiceStart? Start, IReadOnlyList<Finding> Findings) Prepare(
        string dataPath,
        string? configFile,
        string urls,
        Func<DataDirectory, TimeProvider> makeClock,
        Func<DataDirectory, TimeProvider, (LabSnapshotSource? Source, IReadOnlyList<Finding> Findings)> loadLab)
    {
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(configFile);
        (DataDirectory? data, Finding? finding) = DataDirectory.Open(dataPath);
        if (configuration is null || data is null)
        {
            data?.Dispose();
            return (null, [.. unreadable, .. finding is null ? [] : new[] { finding }, .. UrlFindings(urls)]);
        }

        TimeProvider clock = makeClock(data);
        (LabSnapshotSource? lab, IReadOnlyList<Finding> labFindings) = loadLab(data, clock);
        (ServiceSettings settings, IReadOnlyList<Finding> optionFindings) = SettingsReader.Read(configuration, data.Path, InstallationId.Of(data.Path));
        IReadOnlyList<Finding> findings = [.. UrlFindings(urls), .. optionFindings, .. labFindings];
        if (findings.Count > 0 || lab is null)
        {
            data.Dispose();
            return (null, findings);
        }

        return (new ServiceStart(data, lab, settings, configuration, urls, clock), []);
    }

    private static IEnumerable<Finding> UrlFindings(string urls)
    {
        string[] all = urls.Split(';', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries);
        if (all.Length == 0)
        {
            yield return new Finding("bad-address", "--urls", "No address is given.", urls, $"Use for example {Commands.CommonOptions.DefaultUrls}.");
        }

        foreach (string url in all.Where(url => !Uri.TryCreate(url.Replace("*", "any", StringComparison.Ordinal).Replace("+", "any", StringComparison.Ordinal), UriKind.Absolute, out Uri? parsed)
            || (parsed.Scheme != Uri.UriSchemeHttp && parsed.Scheme != Uri.UriSchemeHttps)))
        {
            yield return new Finding("bad-address", "--urls", "This is not an http or https address.", Finding.Quote(url), $"Use for example {Commands.CommonOptions.DefaultUrls}.");
        }
    }
}
