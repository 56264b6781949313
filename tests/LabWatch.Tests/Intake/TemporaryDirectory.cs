namespace LabWatch.Tests.Intake;

/// <summary>A directory of one test's own, removed after it.</summary>
internal sealed class TemporaryDirectory : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("labwatch-intake-").FullName;

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
