namespace LabWatch.Tests;

/// <summary>Files of the repository, found by walking up from the test assembly.</summary>
internal static class RepositoryFiles
{
    private static readonly string Root = FindRoot();

    public static string PathOf(params ReadOnlySpan<string> parts) => Path.Combine([Root, .. parts]);

    private static string FindRoot()
    {
        DirectoryInfo? directory = new(AppContext.BaseDirectory);
        while (directory is not null && !File.Exists(Path.Combine(directory.FullName, "LabWatch.sln")))
        {
            directory = directory.Parent;
        }

        return directory?.FullName ?? throw new InvalidOperationException("The tests must run from inside the repository.");
    }
}
