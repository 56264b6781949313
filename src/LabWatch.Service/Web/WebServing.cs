using System.Security.Authentication;
using Microsoft.AspNetCore.HttpOverrides;
using Microsoft.AspNetCore.Server.Kestrel.Core;

namespace LabWatch.Service.Web;

/// <summary>Sets the web server up.</summary>
internal static class WebServing
{
    /// <summary>Largest body that a request may have, bytes: the API takes nothing longer.</summary>
    public const long LargestBody = 16 << 20;

    /// <summary>Limits, TLS and what proxies may say.</summary>
    /// <param name="builder">The service being built.</param>
    /// <param name="options">The options.</param>
    /// <param name="certificate">The certificate; null where nothing is served by https.</param>
    public static void Configure(WebApplicationBuilder builder, WebOptions options, CertificateKeeper? certificate)
    {
        builder.WebHost.ConfigureKestrel(server =>
        {
            server.AddServerHeader = false;
            server.Limits.MaxRequestBodySize = LargestBody;
            if (certificate is not null)
            {
                UseCertificate(server, certificate);
            }
        });
        if (certificate is not null)
        {
            builder.Services.AddSingleton(certificate);
            builder.Services.AddHostedService<CertificateWatch>();
        }

        if (options.Proxies.Count > 0)
        {
            builder.Services.Configure<ForwardedHeadersOptions>(forwarded =>
            {
                forwarded.ForwardedHeaders = ForwardedHeaders.XForwardedFor | ForwardedHeaders.XForwardedProto | ForwardedHeaders.XForwardedHost;
                forwarded.KnownProxies.Clear();
                forwarded.KnownIPNetworks.Clear();
                foreach (System.Net.IPNetwork proxy in options.Proxies)
                {
                    forwarded.KnownIPNetworks.Add(proxy);
                }
            });
        }
    }

    // The selector is asked for each connection, so that a changed certificate counts from the next one on; its chain is sent along.
    private static void UseCertificate(KestrelServerOptions server, CertificateKeeper certificate) => server.ConfigureHttpsDefaults(https =>
    {
        https.SslProtocols = SslProtocols.Tls12 | SslProtocols.Tls13;
        https.ServerCertificateSelector = (_, _) => certificate.Current.Leaf;
        https.OnAuthenticate = (_, handshake) =>
        {
            handshake.ServerCertificateSelectionCallback = null;
            handshake.ServerCertificateContext = certificate.Current.Context;
        };
    });
}
