using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Import;

/// <summary>Publishes readings to a broker, as a device would, for a service that runs. Refused rows are only reported: they never were messages.</summary>
internal sealed class BrokerSink(IMqttClient client, MqttClientOptions options, TimeProvider clock) : IImportSink
{
    private const int UnderWay = 20;
    private static readonly TimeSpan Patience = TimeSpan.FromMinutes(2);
    private static readonly TimeSpan Pause = TimeSpan.FromSeconds(1);

    /// <inheritdoc/>
    public async Task<(int Stored, int Duplicates, int Conflicts)?> PutAsync(IReadOnlyList<ImportPack> packs, IReadOnlyList<RefusedRow> refused, CancellationToken cancellationToken)
    {
        foreach (ImportPack[] some in packs.Chunk(UnderWay))
        {
            await Task.WhenAll(some.Select(pack => PublishAsync(pack, cancellationToken)));
        }

        return null;
    }

    private async Task PublishAsync(ImportPack pack, CancellationToken cancellationToken)
    {
        MqttApplicationMessage message = new MqttApplicationMessageBuilder()
            .WithTopic(pack.Topic).WithPayload(pack.Payload).WithQualityOfServiceLevel(MqttQualityOfServiceLevel.AtLeastOnce).Build();
        long begun = clock.GetTimestamp();
        while (true)
        {
            string problem;
            try
            {
                MqttClientPublishResult result = await client.PublishAsync(message, cancellationToken);
                if (result.IsSuccess)
                {
                    return;
                }

                problem = $"{result.ReasonCode} {result.ReasonString}".TrimEnd();
            }
            catch (Exception exception) when (exception is not OperationCanceledException || !cancellationToken.IsCancellationRequested)
            {
                problem = exception.Message;
            }

            if (clock.GetElapsedTime(begun) > Patience)
            {
                throw new IOException($"The broker does not take the readings: {problem}");
            }

            await Task.Delay(Pause, clock, cancellationToken);
            await ConnectAgainAsync(cancellationToken);
        }
    }

    private async Task ConnectAgainAsync(CancellationToken cancellationToken)
    {
        try
        {
            if (!client.IsConnected)
            {
                await client.ConnectAsync(options, cancellationToken);
            }
        }
        catch (Exception exception) when (exception is not OperationCanceledException)
        {
            // Another one connects, or the broker is not there yet: the next attempt shows.
        }
    }
}
