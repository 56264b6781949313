using System.Net;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Web;

/// <summary>The addresses that are listened on, against the options of TLS.</summary>
internal static class WebAddresses
{
    private static readonly string[] LoopbackNames = ["localhost", "127.0.0.1", "[::1]"];

    /// <summary>The addresses of an option --urls that can be read.</summary>
    public static IReadOnlyList<Uri> Parse(string urls) =>
        [.. urls.Split(';', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries).Select(Read).OfType<Uri>()];

    /// <summary>One address; null where it is none. A star or plus stands for every address of the machine.</summary>
    public static Uri? Read(string url)
    {
        string readable = url.Replace("//*", "//0.0.0.0", StringComparison.Ordinal).Replace("//+", "//0.0.0.0", StringComparison.Ordinal);
        return Uri.TryCreate(readable, UriKind.Absolute, out Uri? parsed) && (parsed.Scheme == Uri.UriSchemeHttp || parsed.Scheme == Uri.UriSchemeHttps) ? parsed : null;
    }

    /// <summary>What is wrong between addresses and options.</summary>
    public static IEnumerable<Finding> Check(IReadOnlyList<Uri> addresses, WebOptions options)
    {
        bool isPlainAllowed = options.AllowPlainHttp || options.Proxies.Count > 0;
        foreach (Uri address in addresses)
        {
            if (address.Scheme == Uri.UriSchemeHttp && !IsLoopback(address) && !isPlainAllowed)
            {
                yield return new Finding(
                    "plain-http", "--urls", "Plain http would carry passwords over a network in the open.", address.GetLeftPart(UriPartial.Authority),
                    "Use https:// with Web:Certificate (the word own makes one), listen on 127.0.0.1, or name the reverse proxy that does TLS in Web:ReverseProxies.");
            }

            if (address.Scheme == Uri.UriSchemeHttps && options.Certificate is null)
            {
                yield return new Finding(
                    "certificate-missing", "Web:Certificate", "An address with https needs a certificate.", address.GetLeftPart(UriPartial.Authority),
                    "Set Web:Certificate to the path of a PFX or PEM file, or to the word own for a self-signed one.");
            }
        }
    }

    /// <summary>
    /// Names by which the service may be called; empty for every name. On loopback alone only its names are right: a page elsewhere whose
    /// name was made to lead here (DNS rebinding) is refused.
    /// </summary>
    public static IReadOnlyList<string> AllowedHosts(IReadOnlyList<Uri> addresses, WebOptions options) =>
        options.HostNames.Count > 0 ? [.. options.HostNames, .. LoopbackNames]
        : addresses.All(IsLoopback) && options.Proxies.Count == 0 ? LoopbackNames
        : [];

    /// <summary>Whether an address is this machine's own.</summary>
    public static bool IsLoopback(Uri address) =>
        address.Host == "localhost" || (IPAddress.TryParse(address.Host.Trim('[', ']'), out IPAddress? ip) && IPAddress.IsLoopback(ip));
}
