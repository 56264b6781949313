using System.Net;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;

namespace LabWatch.Service.Web;

/// <summary>How pages and API are served: TLS, names, proxies.</summary>
internal sealed record WebOptions
{
    /// <summary>The word for a self-signed certificate that the service makes and keeps itself.</summary>
    public const string Own = "own";

    /// <summary>Certificate for https: the word <c>own</c>, or the path of a PFX or PEM file. Null where nothing is served by https.</summary>
    public string? Certificate { get; init; }

    /// <summary>Path of the key of a PEM certificate; null where it is in the same file, or beside it with the ending <c>.key</c>.</summary>
    public string? CertificateKey { get; init; }

    /// <summary>Name of the secret that holds the password of the file; null for none.</summary>
    public string? CertificatePasswordSecret { get; init; }

    /// <summary>Names by which the service may be called, separated by commas. Left out: names of this machine's loopback where only that is listened on, else every name.</summary>
    public string? Hosts { get; init; }

    /// <summary>
    /// Addresses or networks (CIDR) of reverse proxies that do TLS, separated by commas. Plain http may then be listened on, and what these, and only
    /// these, say about the client (X-Forwarded-For, -Proto, -Host) is believed.
    /// </summary>
    public string? ReverseProxies { get; init; }

    /// <summary>Whether plain http may be listened on beyond this machine without a proxy: for a container whose port is published on loopback alone.</summary>
    public bool AllowPlainHttp { get; init; }

    /// <summary>The names in <see cref="Hosts"/>.</summary>
    internal IReadOnlyList<string> HostNames => Split(Hosts);

    /// <summary>The networks in <see cref="ReverseProxies"/>; an address is a network of one.</summary>
    internal IReadOnlyList<IPNetwork> Proxies => [.. Split(ReverseProxies).Select(Network).OfType<IPNetwork>()];

    /// <summary>Everything that is wrong with the options by themselves.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        findings.AddRange(Split(ReverseProxies).Where(text => Network(text) is null).Select(text => new Finding(
            "not-an-address", nameof(ReverseProxies), "This is neither an address nor a network.", Finding.Quote(text), "Write for example 10.0.0.5 or 172.16.0.0/12.")));
        findings.AddRange(HostNames.Where(name => Uri.CheckHostName(name.Trim('[', ']')) is UriHostNameType.Unknown).Select(name => new Finding(
            "not-a-host", nameof(Hosts), "This is no name of a host.", Finding.Quote(name), "Write names without scheme and port, for example labwatch.example.")));
        if (Certificate is not null && Certificate != Own && !Path.IsPathFullyQualified(Certificate))
        {
            findings.Add(new Finding("path-not-absolute", nameof(Certificate), "The path of the certificate must be absolute.", Finding.Quote(Certificate), "Give the full path of a PFX or PEM file, or the word own."));
        }

        if (CertificateKey is not null && !Path.IsPathFullyQualified(CertificateKey))
        {
            findings.Add(new Finding("path-not-absolute", nameof(CertificateKey), "The path of the key must be absolute.", Finding.Quote(CertificateKey), "Give the full path."));
        }

        if (CertificatePasswordSecret is not null && !Slug.IsValid(CertificatePasswordSecret))
        {
            findings.Add(new Finding("not-a-slug", nameof(CertificatePasswordSecret), "This is no name of a secret.", Finding.Quote(CertificatePasswordSecret), "Use small letters, digits and hyphens; the secret itself never stands in the options."));
        }

        return findings;
    }

    private static string[] Split(string? text) =>
        text?.Split([',', ';', ' '], StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries) ?? [];

    private static IPNetwork? Network(string text) =>
        IPAddress.TryParse(text, out IPAddress? address) ? new IPNetwork(address, address.GetAddressBytes().Length * 8)
        : IPNetwork.TryParse(text, out IPNetwork network) ? network
        : null;
}
