using System.Diagnostics;
using System.Globalization;

namespace LabWatch.SystemTests.Reliability;

/// <summary>A volume in memory that is small enough to fill, mounted on a folder. Only root can mount; elsewhere the test skips and says so.</summary>
internal sealed class SmallVolume : IDisposable
{
    private readonly string _folder;

    private SmallVolume(string folder) => _folder = folder;

    private string Filler => Path.Combine(_folder, "filler");

    /// <summary>Mounts a volume of a size, or skips the test.</summary>
    public static async Task<SmallVolume> MountOrSkipAsync(string folder, int megabytes, CancellationToken cancellationToken)
    {
        Assert.SkipUnless(OperatingSystem.IsLinux(), "No small volume can be mounted on this system.");
        Directory.CreateDirectory(folder);
        string? failure = await RunAsync("mount", ["-t", "tmpfs", "-o", string.Create(CultureInfo.InvariantCulture, $"size={megabytes}m"), "tmpfs", folder], cancellationToken);
        Assert.SkipWhen(failure is not null, $"No small volume can be mounted here: {failure}");
        return new SmallVolume(folder);
    }

    /// <summary>Writes until nothing more can be written.</summary>
    public void Fill()
    {
        byte[] chunk = new byte[64 * 1024];
        using FileStream file = new(Filler, FileMode.Append, FileAccess.Write, FileShare.None, bufferSize: 0);
        for (int size = chunk.Length; size > 0;)
        {
            try
            {
                file.Write(chunk, 0, size);
            }
            catch (IOException)
            {
                size /= 2;
            }
        }
    }

    /// <summary>Makes room again.</summary>
    public void Free() => File.Delete(Filler);

    /// <inheritdoc/>
    public void Dispose() => RunAsync("umount", ["-l", _folder], CancellationToken.None).GetAwaiter().GetResult();

    private static async Task<string?> RunAsync(string program, string[] arguments, CancellationToken cancellationToken)
    {
        try
        {
            using Process process = Process.Start(new ProcessStartInfo(program, arguments) { RedirectStandardError = true }) ?? throw new InvalidOperationException(program);
            string error = await process.StandardError.ReadToEndAsync(cancellationToken);
            await process.WaitForExitAsync(cancellationToken);
            return process.ExitCode == 0 ? null : error.Trim();
        }
        catch (System.ComponentModel.Win32Exception exception)
        {
            return exception.Message;
        }
    }
}
