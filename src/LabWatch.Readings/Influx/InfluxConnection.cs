using System.Text;
using System.Text.Json;
using InfluxDB.Client;
using InfluxDB.Client.Api.Domain;
using InfluxDB.Client.Core.Exceptions;

namespace LabWatch.Readings.Influx;

/// <summary>The two endpoints of a server: line protocol in, InfluxQL out. Safe for many callers.</summary>
internal sealed class InfluxConnection : IDisposable
{
    private const int ChunkRows = 20_000;

    private readonly InfluxDbReadingsOptions _options;
    private readonly HttpClient _http;
    private readonly InfluxDBClient _client;
    private readonly WriteApiAsync _write;

    public InfluxConnection(InfluxDbReadingsOptions options, Func<string?> readSecret)
    {
        _options = options;
        _http = new HttpClient(new InfluxRequestHandler(options, readSecret)) { Timeout = options.RequestTimeout, BaseAddress = new Uri(options.Url!.TrimEnd('/') + "/") };
        _client = new InfluxDBClient(new InfluxDBClientOptions(options.Url!.TrimEnd('/')) { Org = options.Organization, Bucket = options.Database, HttpClient = _http });
        _client.EnableGzip();
        _write = _client.GetWriteApiAsync();
    }

    /// <summary>Where it is, for messages.</summary>
    public string Location => $"InfluxDB {_options.Url}, database {_options.Database}";

    /// <summary>
    /// Writes lines in one request; they are forced to the server's disk when it answers. Throws <see cref="InfluxRefusedException"/> where
    /// the server refuses what they say, <see cref="StoreUnavailableException"/> for everything that may go better later.
    /// </summary>
    public async Task WriteAsync(IEnumerable<string> lines, CancellationToken cancellationToken)
    {
        string text = string.Join('\n', lines);
        TimeSpan pause = TimeSpan.FromMilliseconds(50);
        for (int attempt = 1; ; attempt++)
        {
            try
            {
                await _write.WriteRecordAsync(text, WritePrecision.Us, cancellationToken: cancellationToken);
                return;
            }
            catch (HttpException error) when (error.Status is 400 or 422)
            {
                throw new InfluxRefusedException(error.Message, error);
            }
            catch (HttpException error) when (error.Status is 429 or 503 && attempt < _options.Attempts)
            {
                await Task.Delay(pause, TimeProvider.System, cancellationToken);
                pause *= 2;
            }
            catch (Exception error) when (error is HttpException or HttpRequestException or IOException || (error is OperationCanceledException && !cancellationToken.IsCancellationRequested))
            {
                throw Unavailable("does not take readings", error);
            }
        }
    }

    /// <summary>
    /// Runs statements of InfluxQL and hands every piece of every series over: number of the statement, the series' tags, the rows. Times
    /// are microseconds. Throws <see cref="StoreUnavailableException"/>, also where the server reports an error inside a good answer.
    /// </summary>
    public async Task QueryAsync(string statements, Action<int, JsonElement, JsonElement> onRows, CancellationToken cancellationToken)
    {
        string address = $"query?{InfluxRequestHandler.DatabaseQuery(_options)}&epoch=u&chunked=true&chunk_size={ChunkRows}";
        try
        {
            using FormUrlEncodedContent form = new([new("q", statements)]);
            using HttpRequestMessage request = new(HttpMethod.Post, address) { Content = form };
            using HttpResponseMessage answer = await _http.SendAsync(request, HttpCompletionOption.ResponseHeadersRead, cancellationToken);
            await using Stream body = await answer.Content.ReadAsStreamAsync(cancellationToken);
            using StreamReader reader = new(body, Encoding.UTF8, false, 1 << 16);
            while (await reader.ReadLineAsync(cancellationToken) is { } line)
            {
                Take(answer, line, onRows);
            }
        }
        catch (Exception error) when (error is HttpRequestException or JsonException or IOException and not StoreUnavailableException || (error is OperationCanceledException && !cancellationToken.IsCancellationRequested))
        {
            throw Unavailable("does not answer", error);
        }
    }

    public void Dispose()
    {
        _client.Dispose();
        _http.Dispose();
    }

    private void Take(HttpResponseMessage answer, string line, Action<int, JsonElement, JsonElement> onRows)
    {
        if (string.IsNullOrWhiteSpace(line))
        {
            return;
        }

        using JsonDocument document = JsonDocument.Parse(line);
        if (document.RootElement.TryGetProperty("error", out JsonElement whole) || !answer.IsSuccessStatusCode)
        {
            throw new StoreUnavailableException($"{Location} answers {(int)answer.StatusCode}: {(whole.ValueKind is JsonValueKind.String ? whole.GetString() : line)}");
        }

        foreach (JsonElement result in document.RootElement.GetProperty("results").EnumerateArray())
        {
            if (result.TryGetProperty("error", out JsonElement error))
            {
                throw new StoreUnavailableException($"{Location} answers: {error.GetString()}");
            }

            if (result.TryGetProperty("series", out JsonElement all))
            {
                int statement = result.TryGetProperty("statement_id", out JsonElement id) ? id.GetInt32() : 0;
                foreach (JsonElement series in all.EnumerateArray())
                {
                    onRows(statement, series.TryGetProperty("tags", out JsonElement tags) ? tags : default, series.GetProperty("values"));
                }
            }
        }
    }

    private StoreUnavailableException Unavailable(string what, Exception error) => new($"{Location} {what}: {error.Message}", error);
}
