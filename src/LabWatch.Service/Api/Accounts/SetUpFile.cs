namespace LabWatch.Service.Api.Accounts;

/// <summary>Where the code of the set-up is kept until it is used.</summary>
/// <param name="Path">Absolute path of the file.</param>
internal sealed record SetUpFile(string Path)
{
    /// <summary>Keeps a code, for the service's account alone.</summary>
    public void Keep(string code)
    {
        File.Delete(Path);
        FileStreamOptions options = new() { Mode = FileMode.CreateNew, Access = FileAccess.Write, Share = FileShare.Read };
        if (!OperatingSystem.IsWindows())
        {
            options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite;
        }

        using StreamWriter writer = new(Path, options);
        writer.WriteLine(code);
    }

    /// <summary>Deletes it.</summary>
    public void Delete() => File.Delete(Path);
}
