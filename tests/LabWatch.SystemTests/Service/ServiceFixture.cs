using System.Globalization;
using System.Net.Http.Json;
using System.Text.Json;
using LabWatch.Lab.Time;
using LabWatch.Tests.Lab;

namespace LabWatch.SystemTests.Service;

/// <summary>A service on the sample lab with its embedded broker, restartable on the same data.</summary>
internal sealed class ServiceFixture : IAsyncDisposable
{
    private readonly TemporaryDirectory _directory = new();
    private readonly int _port = LabWatchProcess.FreePort();
    private LabWatchProcess? _service;
    private string? _token;

    /// <summary>Prepares a data directory and a lab file.</summary>
    /// <param name="editLab">Changes the text of the sample lab file.</param>
    public ServiceFixture(Func<string, string>? editLab = null)
    {
        File.WriteAllText(_directory.At("lab.json"), (editLab ?? (text => text))(LabFileSample.Text));
    }

    /// <summary>Port of the embedded broker.</summary>
    public int BrokerPort { get; } = LabWatchProcess.FreePort();

    /// <summary>The data directory.</summary>
    public string Data => _directory.At("data");

    /// <summary>The running service.</summary>
    public LabWatchProcess Service => _service ?? throw new InvalidOperationException("Start the service first.");

    /// <summary>Variables for the service besides the port of its broker.</summary>
    public Dictionary<string, string> Environment { get; } = [];

    /// <summary>A shell that plays the service manager; none where null.</summary>
    public string? Launcher { get; set; }

    /// <summary>Starts the service, or starts it again, and waits until it is ready. The first start is followed by the set-up, unless a test plays it.</summary>
    public async Task StartAsync(CancellationToken cancellationToken, bool setsUp = true)
    {
        if (_service is not null)
        {
            await _service.DisposeAsync();
        }

        Environment.TryAdd("LABWATCH__Intake__EmbeddedBroker__Port", BrokerPort.ToString(CultureInfo.InvariantCulture));
        _service = LabWatchProcess.Start(["serve", "--lab", _directory.At("lab.json"), "--data", Data], Environment, _port, Launcher);
        await _service.WaitUntilReadyAsync(cancellationToken);
        if (setsUp)
        {
            _token ??= await _service.SetUpAsync(Data, cancellationToken);
            _service.UseToken(_token);
        }
    }

    /// <summary>The raw readings of a channel of the source fir: time in microseconds and value, in the order given.</summary>
    public async Task<IReadOnlyList<(long Time, double Value)>> ReadAsync(string channel, long fromMicroseconds, long toMicroseconds, CancellationToken cancellationToken)
    {
        string url = $"api/v1/sources/sample.fir/readings?channel={channel}&bucket=raw&from={new Instant(fromMicroseconds)}&to={new Instant(toMicroseconds)}";
        JsonElement answer = await Service.Client.GetFromJsonAsync<JsonElement>(url, cancellationToken);
        return [.. answer.GetProperty("time").EnumerateArray().Select(Microseconds).Zip(answer.GetProperty("raw").EnumerateArray().Select(value => value.GetDouble()))];
    }

    /// <summary>The open alerts of a code.</summary>
    public async Task<IReadOnlyList<JsonElement>> OpenAlertsAsync(string code, CancellationToken cancellationToken)
    {
        JsonElement answer = await Service.Client.GetFromJsonAsync<JsonElement>("api/v1/alerts?open=true", cancellationToken);
        return [.. answer.GetProperty("items").EnumerateArray().Where(alert => alert.GetProperty("code").GetString() == code)];
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        if (_service is not null)
        {
            await _service.DisposeAsync();
        }

        _directory.Dispose();
    }

    private static long Microseconds(JsonElement time) => Instant.TryParse(time.GetString(), out Instant instant) ? instant.Microseconds : throw new JsonException(time.GetRawText());
}
