using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Outgoing;
using Microsoft.Extensions.Logging;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Brokers.External;

/// <summary>Publishes the state of service and sources over one connection, all of it first and what changes then. A failure is reported once a connection and tried again with the next change.</summary>
internal sealed class StatePublisher(IMqttClient client, StateBoard board, TimeSpan answerWithin, TimeProvider clock, ILogger logger)
{
    private bool _reported;

    /// <summary>Publishes until the connection has ended.</summary>
    /// <param name="topic">Topic of the service's own state.</param>
    /// <param name="birth">What the service says about itself now.</param>
    /// <param name="ended">Ends with the connection.</param>
    public async Task RunAsync(string topic, byte[] birth, Task ended)
    {
        await PublishAsync(topic, birth);
        long sent = 0;
        while (!ended.IsCompleted)
        {
            Task changed = board.Changed;
            foreach (StateMessage message in board.After(sent))
            {
                if (ended.IsCompleted)
                {
                    return;
                }

                await PublishAsync(message.Topic, message.Payload);
                sent = message.Version;
            }

            await Task.WhenAny(changed, ended);
        }
    }

    /// <summary>Publishes one retained message and waits for its acknowledgement, within the deadline for answers.</summary>
    public async Task PublishAsync(string topic, byte[] payload)
    {
        string? problem = null;
        try
        {
            using var deadline = new CancellationTokenSource(answerWithin, clock);
            MqttClientPublishResult result = await client.PublishAsync(
                new MqttApplicationMessageBuilder().WithTopic(topic).WithPayload(payload).WithRetainFlag().WithQualityOfServiceLevel(MqttQualityOfServiceLevel.AtLeastOnce).Build(),
                deadline.Token);
            problem = result.IsSuccess ? null : result.ReasonCode.ToString();
        }
        catch (Exception exception)
        {
            // The link is gone or hangs; the supervisor finds out by itself, and the next connection begins with everything.
            problem = exception.Message;
        }

        if (problem is not null && !_reported)
        {
            _reported = true;
            IntakeLog.StateNotPublished(logger, topic, problem);
        }
    }
}
