using System.Globalization;
using LabWatch.Intake.Options;

namespace LabWatch.Benchmarks.Intake;

/// <summary>
/// Readings per second, durable, through the whole intake with the SQLite store, as a ratio to a bare subscriber of the same broker in
/// the same run: three alternating runs, medians. Live: the publishing process and the subscriber run together. Drain: the broker's queue
/// is filled first, so that the publisher takes nothing from the subscriber.
/// </summary>
internal static class IntakeBenchmark
{
    private const int Publishers = 4;
    private const int Runs = 3;
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(2);
    private static readonly TimeSpan Patience = TimeSpan.FromMinutes(1);

    /// <summary>
    /// Arguments: messages of packs of 12 (others in proportion; default 20000), directory for the data (default: temporary), which brokers
    /// (<c>embedded</c>, <c>external</c>; default: both).
    /// </summary>
    public static int Run(string[] args)
    {
        int messages = args.Length > 0 ? int.Parse(args[0], CultureInfo.InvariantCulture) : 20_000;
        string directory = args.Length > 1 ? args[1] : Path.GetTempPath();
        RunAsync(messages, directory, args.Length > 2 ? args[2] : "both").GetAwaiter().GetResult();
        return 0;
    }

    private static async Task RunAsync(int messages, string directory, string which)
    {
        if (which == "embedded")
        {
            await MeasureEmbeddedAsync(messages, directory);
            return;
        }

        if (BenchBroker.IsInstalled)
        {
            Console.WriteLine($"mosquitto: {BenchBroker.Settings}; {Publishers} publishers in a process of their own, 25 under way each");
            foreach (bool live in new[] { true, false })
            {
                await CompareAsync("packs of 12", 12, messages, live, directory);
                await CompareAsync("packs of 60", 60, messages / 2, live, directory);
                await CompareAsync("single readings", 1, messages * 2, live, directory);
            }
        }
        else
        {
            Console.WriteLine("mosquitto is not installed: no comparison.");
        }

        if (which != "external")
        {
            await MeasureEmbeddedAsync(messages, directory);
        }
    }

    private static async Task MeasureEmbeddedAsync(int messages, string directory)
    {
        foreach ((int devices, int window) in new[] { (50, 1), (50, 20), (8, 100), (1, 100) })
        {
            await MeasureEmbeddedAsync(messages * 2, devices, window, directory);
        }
    }

    private static async Task CompareAsync(string name, int records, int messages, bool live, string directory)
    {
        var bare = new List<double>();
        var whole = new List<double>();
        for (int run = 0; run < Runs; run++)
        {
            bare.Add(await MeasureAsync(port => new BareSubscriber(port), records, messages, live));
            whole.Add(await MeasureAsync(
                port => new IntakeSubscriber(directory, Publishers, new ExternalBrokerOptions { Host = "127.0.0.1", Port = port }, null), records, messages, live));
        }

        double bareMedian = bare.Order().ElementAt(Runs / 2);
        double wholeMedian = whole.Order().ElementAt(Runs / 2);
        Console.WriteLine(string.Create(
            CultureInfo.InvariantCulture,
            $"{(live ? "live " : "drain")} {name,-16} bare {bareMedian,9:N0} msg/s  durable {wholeMedian,9:N0} msg/s = {wholeMedian * records,10:N0} readings/s  ratio {wholeMedian / bareMedian:F2}  (bare {Show(bare)}; durable {Show(whole)})"));
    }

    private static async Task<double> MeasureAsync(Func<int, ISubscriber> create, int records, int messages, bool live)
    {
        using var broker = new BenchBroker();
        await Task.Delay(TimeSpan.FromMilliseconds(300), TimeProvider.System);
        await using ISubscriber subscriber = create(broker.Port);
        await subscriber.StartAsync();
        int each = messages / Publishers;
        if (!live)
        {
            await subscriber.StopAsync();
            await subscriber.DisposeAsync();
        }

        Task<PublisherReport> publishing = PublisherProcess.RunAsync(broker.Port, Publishers, each, records, 25);
        if (live)
        {
            return await TimeAsync(subscriber, each * Publishers, publishing);
        }

        await publishing;
        await using ISubscriber second = create(broker.Port);
        long begin = TimeProvider.System.GetTimestamp();
        await second.StartAsync();
        await UntilAsync(() => second.Done >= each * Publishers, second);
        return each * Publishers / TimeProvider.System.GetElapsedTime(begin).TotalSeconds;
    }

    private static async Task<double> TimeAsync(ISubscriber subscriber, int messages, Task publishing)
    {
        await UntilAsync(() => subscriber.Done > 0, subscriber);
        long before = subscriber.Done;
        long begin = TimeProvider.System.GetTimestamp();
        await UntilAsync(() => subscriber.Done >= messages, subscriber);
        double seconds = TimeProvider.System.GetElapsedTime(begin).TotalSeconds;
        await publishing;
        return (messages - before) / seconds;
    }

    private static async Task MeasureEmbeddedAsync(int messages, int devices, int window, string directory)
    {
        await using var intake = new IntakeSubscriber(directory, devices, null, new EmbeddedBrokerOptions { Port = 0, MaximumMessagesPerSecond = 1_000_000 });
        await intake.StartAsync();
        int each = messages / devices;
        PublisherReport report = await PublisherProcess.RunAsync(intake.Port, devices, each, 12, window);
        double rate = each * devices / report.Seconds;
        Console.WriteLine(string.Create(
            CultureInfo.InvariantCulture,
            $"embedded, {devices} devices, packs of 12, {window} under way each: {rate,9:N0} msg/s = {rate * 12,10:N0} readings/s durable; acknowledged after {report.MedianMilliseconds:F1} ms (median), {report.P99Milliseconds:F1} ms (p99); refused {intake.Totals.Refused}"));
    }

    private static async Task UntilAsync(Func<bool> condition, ISubscriber subscriber)
    {
        long start = TimeProvider.System.GetTimestamp();
        while (!condition())
        {
            if (TimeProvider.System.GetElapsedTime(start) > Patience)
            {
                throw new TimeoutException($"The run does not end: {subscriber}");
            }

            await Task.Delay(Pause, TimeProvider.System);
        }
    }

    private static string Show(IEnumerable<double> rates) => string.Join(", ", rates.Select(rate => rate.ToString("N0", CultureInfo.InvariantCulture)));
}
