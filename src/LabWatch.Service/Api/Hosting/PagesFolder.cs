namespace LabWatch.Service.Api.Hosting;

/// <summary>Where the built pages lie.</summary>
/// <param name="Path">Absolute path of the folder.</param>
internal sealed record PagesFolder(string Path)
{
    /// <summary>The folder beside the program.</summary>
    public static PagesFolder BesideProgram { get; } = new(System.IO.Path.Combine(AppContext.BaseDirectory, "pages"));

    /// <summary>Whether the pages are there.</summary>
    public bool IsBuilt => File.Exists(System.IO.Path.Combine(Path, "index.html"));
}
