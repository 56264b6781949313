using System.Globalization;
using System.Text.Json;
using LabWatch.Lab.Time;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.Benchmarks.Intake;

/// <summary>
/// The devices, as a process of their own: a number of connections, each with a number of QoS 1 messages under way. Payloads are made
/// beforehand. Prints one line of JSON with the time to the last acknowledgement and the latencies.
/// </summary>
internal static class IntakePublisher
{
    /// <summary>Arguments: port, connections, messages of each, records in a message, messages under way.</summary>
    public static int Run(string[] args)
    {
        int[] numbers = [.. args.Select(text => int.Parse(text, CultureInfo.InvariantCulture))];
        PublishAsync(numbers[0], numbers[1], numbers[2], numbers[3], numbers[4]).GetAwaiter().GetResult();
        return 0;
    }

    private static async Task PublishAsync(int port, int connections, int messages, int records, int window)
    {
        long start = Instant.Now(TimeProvider.System).Microseconds - (messages * 1_000L);
        (string Topic, byte[] Payload)[][] payloads =
            [.. Enumerable.Range(0, connections).Select(source => Enumerable.Range(0, messages).Select(number => PackWriter.Write(source, number, records, start)).ToArray())];
        var clients = new List<IMqttClient>();
        for (int i = 0; i < connections; i++)
        {
            IMqttClient client = new MqttClientFactory().CreateMqttClient();
            await client.ConnectAsync(new MqttClientOptionsBuilder().WithTcpServer("127.0.0.1", port).WithClientId($"publisher-{i}").WithTimeout(TimeSpan.FromMinutes(1)).Build());
            clients.Add(client);
        }

        long begin = TimeProvider.System.GetTimestamp();
        double[][] latencies = await Task.WhenAll(clients.Select((client, index) => PublishAsync(client, payloads[index], window)));
        double seconds = TimeProvider.System.GetElapsedTime(begin).TotalSeconds;
        double[] all = [.. latencies.SelectMany(values => values).Order()];
        Console.WriteLine(JsonSerializer.Serialize(new PublisherReport(seconds, all[all.Length / 2], all[all.Length * 99 / 100])));
    }

    private static async Task<double[]> PublishAsync(IMqttClient client, (string Topic, byte[] Payload)[] payloads, int window)
    {
        double[] latencies = new double[payloads.Length];
        int next = -1;
        async Task WorkAsync()
        {
            for (int i; (i = Interlocked.Increment(ref next)) < payloads.Length;)
            {
                long sent = TimeProvider.System.GetTimestamp();
                await client.PublishBinaryAsync(payloads[i].Topic, payloads[i].Payload, MqttQualityOfServiceLevel.AtLeastOnce);
                latencies[i] = TimeProvider.System.GetElapsedTime(sent).TotalMilliseconds;
            }
        }

        await Task.WhenAll(Enumerable.Range(0, window).Select(_ => WorkAsync()));
        return latencies;
    }
}
