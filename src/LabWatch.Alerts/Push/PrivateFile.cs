namespace LabWatch.Alerts.Push;

/// <summary>Writes a file that only the service may read, whole or not at all.</summary>
internal static class PrivateFile
{
    /// <summary>Writes a file durably and puts it in place by rename.</summary>
    public static void Write(string path, byte[] content)
    {
        string fresh = path + ".new";
        FileStreamOptions options = new() { Mode = FileMode.Create, Access = FileAccess.Write };
        if (!OperatingSystem.IsWindows())
        {
            options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite;
        }

        using (FileStream stream = new(fresh, options))
        {
            stream.Write(content);
            stream.Flush(flushToDisk: true);
        }

        File.Move(fresh, path, overwrite: true);
    }
}
