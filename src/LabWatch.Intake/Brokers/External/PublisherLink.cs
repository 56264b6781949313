using LabWatch.Intake.Options;
using LabWatch.Lab.Secrets;
using MQTTnet;

namespace LabWatch.Intake.Brokers.External;

/// <summary>Builds the options of a client that only publishes, with the same care for TLS as the intake's own.</summary>
public static class PublisherLink
{
    /// <summary>The options of a clean session.</summary>
    /// <param name="options">Address and TLS of the broker.</param>
    /// <param name="clientId">Id of the client.</param>
    /// <param name="user">User; null for none.</param>
    /// <param name="password">Password; null for none.</param>
    public static MqttClientOptions Options(ExternalBrokerOptions options, string clientId, string? user, string? password)
    {
        ArgumentNullException.ThrowIfNull(options);
        MqttClientOptionsBuilder builder = new MqttClientOptionsBuilder().WithTcpServer(options.Host, options.Port).WithClientId(clientId).WithTimeout(options.AnswerWithin * 2);
        builder = options.Tls ? builder.WithTlsOptions(tls => LinkOptions.Secure(tls, options, new NamedSecrets(null, _ => null))) : builder;
        return user is null ? builder.Build() : builder.WithCredentials(user, password).Build();
    }
}
