namespace LabWatch.SystemTests;

/// <summary>A directory that is gone when the test is over.</summary>
internal sealed class TemporaryDirectory : IDisposable
{
    /// <summary>Absolute path.</summary>
    public string Path { get; } = Directory.CreateTempSubdirectory("labwatch-test-").FullName;

    /// <summary>Path of something in the directory.</summary>
    public string At(params ReadOnlySpan<string> parts) => System.IO.Path.Combine([Path, .. parts]);

    /// <inheritdoc/>
    public void Dispose()
    {
        try
        {
            Directory.Delete(Path, recursive: true);
        }
        catch (IOException)
        {
            // A process that a failed test left behind may still write here; the system clears its temporary folder.
        }
    }
}
