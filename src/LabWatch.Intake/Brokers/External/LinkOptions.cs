using LabWatch.Intake.Options;
using LabWatch.Intake.Secrets;
using MQTTnet;
using MQTTnet.Formatter;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Brokers.External;

/// <summary>Builds what the client is given, for the two kinds of connection.</summary>
internal static class LinkOptions
{
    public static MqttClientOptions Connect(ExternalBrokerOptions options, BrokerIdentity identity, ISecretReader secrets, bool durable)
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

        return options.UserSecret is { } user
            ? builder.WithCredentials(Need(secrets, user), options.PasswordSecret is { } password ? Need(secrets, password) : null).Build()
            : builder.Build();
    }

    public static MqttClientSubscribeOptions Subscribe(ExternalBrokerOptions options, BrokerIdentity identity, bool durable)
    {
        MqttTopicFilterBuilder filter = new MqttTopicFilterBuilder()
            .WithTopic(identity.TopicFilter)
            .WithQualityOfServiceLevel(durable ? MqttQualityOfServiceLevel.AtLeastOnce : MqttQualityOfServiceLevel.AtMostOnce);
        if (!options.UseMqtt311)
        {
            filter = filter.WithRetainHandling(MqttRetainHandling.SendAtSubscribeIfNewSubscriptionOnly);
        }

        return new MqttClientSubscribeOptionsBuilder().WithTopicFilter(filter).Build();
    }

    public static MqttClientDisconnectOptions Disconnect(ExternalBrokerOptions options, bool durable)
    {
        var builder = new MqttClientDisconnectOptionsBuilder();
        return options.UseMqtt311 || !durable ? builder.Build() : builder.WithSessionExpiryInterval(ExpirySeconds(options)).Build();
    }

    public static uint ExpirySeconds(ExternalBrokerOptions options) => (uint)options.SessionExpiry.TotalSeconds;

    private static string Need(ISecretReader secrets, string name) =>
        secrets.Read(name) ?? throw new LinkFailedException($"The secret {name} is not set.");
}
