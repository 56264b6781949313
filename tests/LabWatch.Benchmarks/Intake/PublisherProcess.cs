using System.Diagnostics;
using System.Globalization;
using System.Text.Json;

namespace LabWatch.Benchmarks.Intake;

/// <summary>Starts this program again as the publisher.</summary>
internal static class PublisherProcess
{
    public static async Task<PublisherReport> RunAsync(int port, int connections, int messages, int records, int window)
    {
        int[] numbers = [port, connections, messages, records, window];
        string[] arguments = [.. numbers.Select(number => number.ToString(CultureInfo.InvariantCulture))];
        using Process process = Process.Start(new ProcessStartInfo("dotnet", [typeof(PublisherProcess).Assembly.Location, "intake-publisher", .. arguments])
        {
            RedirectStandardOutput = true,
        })!;
        string output = await process.StandardOutput.ReadToEndAsync();
        await process.WaitForExitAsync();
        return JsonSerializer.Deserialize<PublisherReport>(output)!;
    }
}
