using System.Net.Http.Headers;
using System.Net.Http.Json;
using System.Text.Json;
using DotNet.Testcontainers.Builders;
using DotNet.Testcontainers.Containers;
using LabWatch.Readings;

namespace LabWatch.SystemTests.Readings;

/// <summary>
/// An InfluxDB server in a container of the image that <c>LABWATCH_TEST_INFLUXDB_IMAGE</c> names (for example <c>influxdb:2</c>).
/// <see cref="WhyNot"/> says why there is none: a skip that is permitted, since an image has to be fetched from somewhere.
/// </summary>
public sealed class InfluxContainer : IAsyncLifetime
{
    private const string Variable = "LABWATCH_TEST_INFLUXDB_IMAGE";
    private const string Token = "labwatch-test-token";
    private const string Organization = "labwatch";
    private const ushort ServerPort = 8086;

    private readonly TemporaryDirectory _secrets = new();
    private IContainer? _container;
    private HttpClient? _http;
    private bool _isFirstGeneration;
    private int _databases;

    /// <summary>Why no server runs; null where one does.</summary>
    public string? WhyNot { get; private set; }

    public async ValueTask InitializeAsync()
    {
        if (Environment.GetEnvironmentVariable(Variable) is not { Length: > 0 } image)
        {
            WhyNot = $"No container image is named in {Variable}.";
            return;
        }

        try
        {
            // The address inside the container is that of every interface; outside it is published on the loopback alone.
            _container = new ContainerBuilder(image)
                .WithPortBinding(ServerPort, assignRandomHostPort: true)
                .WithEnvironment("DOCKER_INFLUXDB_INIT_MODE", "setup")
                .WithEnvironment("DOCKER_INFLUXDB_INIT_USERNAME", "labwatch")
                .WithEnvironment("DOCKER_INFLUXDB_INIT_PASSWORD", "labwatch-test")
                .WithEnvironment("DOCKER_INFLUXDB_INIT_ORG", Organization)
                .WithEnvironment("DOCKER_INFLUXDB_INIT_BUCKET", "first")
                .WithEnvironment("DOCKER_INFLUXDB_INIT_ADMIN_TOKEN", Token)
                .WithCreateParameterModifier(static parameters =>
                {
                    foreach (Docker.DotNet.Models.PortBinding binding in (parameters.HostConfig?.PortBindings?.Values ?? []).SelectMany(static all => all))
                    {
                        binding.HostIP = "127.0.0.1";
                    }
                })
                .Build();
            using CancellationTokenSource patience = new(TimeSpan.FromMinutes(3), TimeProvider.System);
            await _container.StartAsync(patience.Token);
        }
        catch (Exception error) when (error is DockerUnavailableException or Docker.DotNet.DockerApiException or OperationCanceledException)
        {
            WhyNot = $"No container image can be run here ({image}): {error.Message}";
            return;
        }

        _http = new HttpClient { BaseAddress = new Uri($"http://127.0.0.1:{_container.GetMappedPublicPort(ServerPort)}"), Timeout = TimeSpan.FromSeconds(10) };
        _http.DefaultRequestHeaders.Authorization = new AuthenticationHeaderValue("Token", Token);
        await Poll.UntilAsync("the server in the container answers", AnswersAsync, TimeSpan.FromSeconds(120), CancellationToken.None);
        await File.WriteAllTextAsync(_secrets.At("influx-token"), Token);
    }

    /// <summary>Options for a database (bucket) of its own.</summary>
    public async Task<ReadingsOptions> NewDatabaseAsync(string dataDirectory, CancellationToken cancellationToken)
    {
        Assert.SkipWhen(WhyNot is not null, WhyNot ?? string.Empty);
        string name = $"readings_{Interlocked.Increment(ref _databases)}";
        if (!_isFirstGeneration)
        {
            await MakeBucketAsync(name, cancellationToken);
        }

        return new ReadingsOptions
        {
            DataDirectory = dataDirectory,
            SecretsDirectory = _secrets.Path,
            Engine = ReadingsEngine.InfluxDb,
            InfluxDb = new InfluxDbReadingsOptions
            {
                Url = _http!.BaseAddress!.ToString(),
                Database = name,
                Organization = Organization,
                WritePath = _isFirstGeneration ? "/write" : "/api/v2/write",
                TokenSecret = _isFirstGeneration ? null : "influx-token",
            },
        };
    }

    public async ValueTask DisposeAsync()
    {
        _http?.Dispose();
        await (_container?.DisposeAsync() ?? ValueTask.CompletedTask);
        _secrets.Dispose();
    }

    private async Task MakeBucketAsync(string name, CancellationToken cancellationToken)
    {
        JsonElement organizations = await _http!.GetFromJsonAsync<JsonElement>($"/api/v2/orgs?org={Organization}", cancellationToken);
        string organization = organizations.GetProperty("orgs")[0].GetProperty("id").GetString()!;
        using HttpResponseMessage made = await _http!.PostAsJsonAsync("/api/v2/buckets", new { orgID = organization, name, retentionRules = Array.Empty<object>() }, cancellationToken);
        made.EnsureSuccessStatusCode();
        string bucket = (await made.Content.ReadFromJsonAsync<JsonElement>(cancellationToken)).GetProperty("id").GetString()!;
        using HttpResponseMessage mapped = await _http!.PostAsJsonAsync(
            "/api/v2/dbrps", new { orgID = organization, bucketID = bucket, database = name, retention_policy = "autogen", @default = true }, cancellationToken);
        mapped.EnsureSuccessStatusCode();
    }

    private async Task<bool> AnswersAsync()
    {
        try
        {
            using HttpResponseMessage answer = await _http!.GetAsync(new Uri("/ping", UriKind.Relative));
            _isFirstGeneration = answer.Headers.TryGetValues("X-Influxdb-Version", out IEnumerable<string>? versions) && versions.First().TrimStart('v').StartsWith("1.", StringComparison.Ordinal);
            return answer.IsSuccessStatusCode;
        }
        catch (Exception error) when (error is HttpRequestException or OperationCanceledException)
        {
            return false;
        }
    }
}
