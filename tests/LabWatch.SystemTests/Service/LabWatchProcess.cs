using System.Collections.Concurrent;
using System.Diagnostics;
using System.Globalization;
using System.Net;
using System.Net.Sockets;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace LabWatch.SystemTests.Service;

/// <summary>The built service as a process of its own, on loopback and a free port, so that a test can kill it.</summary>
internal sealed class LabWatchProcess : IAsyncDisposable
{
    private readonly Process _process;
    private readonly ConcurrentQueue<string> _output = new();

    private const string ManagerScript = "\"$0\" \"$@\" & child=$!; trap 'kill -TERM $child' TERM; wait $child; wait $child";

    // The service's own output, with the pages beside it; the copy beside the tests has none.
    private static string Program { get; } = FindProgram();

    private LabWatchProcess(Process process, Uri address)
    {
        _process = process;
        Address = address;
        Client = new HttpClient(new SocketsHttpHandler { SslOptions = { RemoteCertificateValidationCallback = (_, certificate, _, _) => IsPrinted(certificate) } })
        {
            BaseAddress = address,
            Timeout = TimeSpan.FromSeconds(120),
        };

        // As a browser does: with a cookie, a change must come from the service's own pages.
        Client.DefaultRequestHeaders.Add("Origin", address.GetLeftPart(UriPartial.Authority));
    }

    /// <summary>Where pages and API are.</summary>
    public Uri Address { get; }

    /// <summary>Speaks to the API.</summary>
    public HttpClient Client { get; }

    /// <summary>What the process wrote, both streams.</summary>
    public string Output => string.Join('\n', _output);

    /// <summary>A port that was free a moment ago.</summary>
    public static int FreePort()
    {
        using TcpListener listener = new(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }

    /// <summary>Starts the service; does not wait until it is ready.</summary>
    /// <param name="arguments">Command and options without --urls.</param>
    /// <param name="environment">Variables besides those of this process.</param>
    /// <param name="port">Port of the pages; a free one where null.</param>
    /// <param name="launcher">A shell that starts the service and passes the request to end on, as a service manager does; none where null.</param>
    /// <param name="scheme">http, or https with a certificate whose fingerprint the service prints.</param>
    public static LabWatchProcess Start(IEnumerable<string> arguments, IReadOnlyDictionary<string, string>? environment = null, int? port = null, string? launcher = null, string scheme = "http")
    {
        Uri address = new($"{scheme}://127.0.0.1:{port ?? FreePort()}");
        Process process = Launch([.. arguments, "--urls", address.GetLeftPart(UriPartial.Authority)], environment, launcher);
        LabWatchProcess service = new(process, address);
        process.OutputDataReceived += (_, line) => service._output.Enqueue(line.Data ?? string.Empty);
        process.ErrorDataReceived += (_, line) => service._output.Enqueue(line.Data ?? string.Empty);
        process.BeginOutputReadLine();
        process.BeginErrorReadLine();
        return service;
    }

    /// <summary>Starts a command; the caller waits for it or kills it. Nobody reads what it writes, so it must not write much.</summary>
    public static Process Begin(IEnumerable<string> arguments) => Launch(arguments, environment: null);

    /// <summary>Runs a command to its end: exit code and everything it wrote.</summary>
    public static async Task<(int ExitCode, string Output)> RunAsync(
        IEnumerable<string> arguments, CancellationToken cancellationToken, IReadOnlyDictionary<string, string>? environment = null)
    {
        using Process process = Launch(arguments, environment);
        Task<string> output = process.StandardOutput.ReadToEndAsync(cancellationToken);
        Task<string> error = process.StandardError.ReadToEndAsync(cancellationToken);
        await process.WaitForExitAsync(cancellationToken);
        return (process.ExitCode, await output + await error);
    }

    /// <summary>Waits until the service says that it is ready.</summary>
    public Task WaitUntilReadyAsync(CancellationToken cancellationToken) => Poll.UntilAsync(
        "the service is ready",
        async () =>
        {
            if (_process.HasExited)
            {
                throw new InvalidOperationException($"The service ended with {_process.ExitCode}:\n{Output}");
            }

            try
            {
                using HttpResponseMessage answer = await Client.GetAsync("health/ready", cancellationToken);
                return answer.IsSuccessStatusCode;
            }
            catch (HttpRequestException)
            {
                return false;
            }
        },
        TimeSpan.FromSeconds(120),
        cancellationToken,
        () => Output);

    /// <summary>Ends the process as a power cut of the program would: no handler runs.</summary>
    public async Task KillAsync()
    {
        _process.Kill(entireProcessTree: true);
        await _process.WaitForExitAsync();
    }

    /// <summary>Asks the process to end (SIGTERM) and gives its exit code.</summary>
    public async Task<int> StopAsync(CancellationToken cancellationToken)
    {
        using Process kill = Process.Start("kill", ["-TERM", _process.Id.ToString(CultureInfo.InvariantCulture)]);
        await kill.WaitForExitAsync(cancellationToken);
        await _process.WaitForExitAsync(cancellationToken);
        return _process.ExitCode;
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        Client.Dispose();
        if (!_process.HasExited)
        {
            await KillAsync();
        }

        _process.Dispose();
    }

    /// <summary>What a person does who compares the fingerprint once.</summary>
    private bool IsPrinted(X509Certificate? certificate) =>
        certificate is not null
        && Output.Contains(string.Join(':', SHA256.HashData(certificate.GetRawCertData()).Select(value => value.ToString("X2", CultureInfo.InvariantCulture))), StringComparison.Ordinal);

    private static string FindProgram()
    {
        DirectoryInfo framework = new(AppContext.BaseDirectory.TrimEnd(Path.DirectorySeparatorChar));
        DirectoryInfo? root = framework;
        while (root is not null && !File.Exists(Path.Combine(root.FullName, "LabWatch.sln")))
        {
            root = root.Parent;
        }

        return Path.Combine(root?.FullName ?? throw new InvalidOperationException("The tests must run from inside the repository."), "src", "LabWatch.Service", "bin", framework.Parent!.Name, framework.Name, "labwatch.dll");
    }

    private static Process Launch(IEnumerable<string> arguments, IReadOnlyDictionary<string, string>? environment, string? launcher = null)
    {
        ProcessStartInfo start = new(launcher ?? "dotnet")
        {
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            WorkingDirectory = Path.GetTempPath(),
        };
        foreach (string argument in (IEnumerable<string>)[.. launcher is null ? Array.Empty<string>() : ["-c", ManagerScript, "dotnet"], Program, .. arguments])
        {
            start.ArgumentList.Add(argument);
        }

        foreach ((string name, string value) in environment ?? new Dictionary<string, string>())
        {
            start.Environment[name] = value;
        }

        return Process.Start(start) ?? throw new InvalidOperationException("dotnet could not be started.");
    }
}
