using System.Security.Authentication;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Intake.Options;
using LabWatch.Intake.Outgoing;
using LabWatch.Lab.Secrets;
using MQTTnet;
using MQTTnet.Formatter;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Brokers.External;

/// <summary>Builds what the client is given, for the two kinds of connection.</summary>
internal static class LinkOptions
{
    public static MqttClientOptions Connect(ExternalBrokerOptions options, BrokerIdentity identity, NamedSecrets secrets, ServiceState state, bool durable)
    {
        MqttClientOptionsBuilder builder = new MqttClientOptionsBuilder()
            .WithTcpServer(options.Host, options.Port)
            .WithClientId(durable ? identity.ClientId : identity.WatchClientId)
            .WithProtocolVersion(options.UseMqtt311 ? MqttProtocolVersion.V311 : MqttProtocolVersion.V500)
            .WithCleanStart(!durable)
            .WithKeepAlivePeriod(options.KeepAlive)
            .WithTimeout(options.AnswerWithin);
        if (!options.UseMqtt311)
        {
            builder = builder
                .WithSessionExpiryInterval(durable ? ExpirySeconds(options) : 0)
                .WithReceiveMaximum((ushort)options.ReceiveMaximum);
        }

        if (options.PublishState)
        {
            builder = builder.WithWillTopic(state.Topic).WithWillPayload(state.Will()).WithWillRetain(true).WithWillQualityOfServiceLevel(MqttQualityOfServiceLevel.AtLeastOnce);
        }

        if (options.Tls)
        {
            builder = builder.WithTlsOptions(tls => Secure(tls, options, secrets));
        }

        return options.UserSecret is { } user
            ? builder.WithCredentials(Need(secrets, user), options.PasswordSecret is { } password ? Need(secrets, password) : null).Build()
            : builder.Build();
    }

    public static MqttClientSubscribeOptions Subscribe(ExternalBrokerOptions options, BrokerIdentity identity, bool durable)
    {
        var subscribe = new MqttClientSubscribeOptionsBuilder();
        foreach (string topic in identity.TopicFilters)
        {
            subscribe = subscribe.WithTopicFilter(Filter(topic, options, durable));
        }

        return subscribe.Build();
    }

    private static MqttTopicFilterBuilder Filter(string topic, ExternalBrokerOptions options, bool durable)
    {
        MqttTopicFilterBuilder filter = new MqttTopicFilterBuilder()
            .WithTopic(topic)
            .WithQualityOfServiceLevel(durable ? MqttQualityOfServiceLevel.AtLeastOnce : MqttQualityOfServiceLevel.AtMostOnce);
        if (!options.UseMqtt311)
        {
            filter = filter.WithRetainHandling(MqttRetainHandling.SendAtSubscribeIfNewSubscriptionOnly);
        }

        return filter;
    }

    public static MqttClientDisconnectOptions Disconnect(ExternalBrokerOptions options, bool durable)
    {
        var builder = new MqttClientDisconnectOptionsBuilder();
        return options.UseMqtt311 || !durable ? builder.Build() : builder.WithSessionExpiryInterval(ExpirySeconds(options)).Build();
    }

    public static uint ExpirySeconds(ExternalBrokerOptions options) => (uint)options.SessionExpiry.TotalSeconds;

    // The library checks chain and name unless it is told not to; it is told nothing of the kind. Revocation is not asked for: authorities of
    // a laboratory rarely answer, and one that is silent would stop the intake.
    public static void Secure(MqttClientTlsOptionsBuilder tls, ExternalBrokerOptions options, NamedSecrets secrets)
    {
        tls.UseTls(true)
            .WithSslProtocols(SslProtocols.Tls12 | SslProtocols.Tls13)
            .WithTargetHost(options.ServerName ?? options.Host)
            .WithRevocationMode(X509RevocationMode.NoCheck);
        if (options.Authorities is { } authorities)
        {
            tls.WithTrustChain(PemFile.ReadAuthorities(authorities));
        }

        if (options.ClientCertificate is { } certificate)
        {
            string? password = options.ClientCertificatePasswordSecret is { } name ? Need(secrets, name) : null;
            tls.WithClientCertificates([PemFile.ReadWithKey(certificate, options.ClientCertificateKey, password)]);
        }
    }

    private static string Need(NamedSecrets secrets, string name) =>
        secrets.Read(name) ?? throw new LinkFailedException($"The secret {name} is not set.");
}
