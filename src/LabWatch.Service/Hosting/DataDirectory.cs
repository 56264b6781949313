using LabWatch.Lab.Findings;

namespace LabWatch.Service.Hosting;

/// <summary>The directory that holds everything the service keeps, locked against a second process for as long as this object lives.</summary>
internal sealed class DataDirectory : IDisposable
{
    private readonly FileStream _lock;

    private DataDirectory(string path, FileStream heldLock)
    {
        Path = path;
        _lock = heldLock;
    }

    /// <summary>Absolute path.</summary>
    public string Path { get; }

    /// <summary>Own keys, readable by the service's account alone.</summary>
    public string Keys => System.IO.Path.Combine(Path, "keys");

    /// <summary>
    /// Where data lie when nothing else is said: the directory that the service manager gives, else the machine's or user's place for
    /// application data.
    /// </summary>
    /// <param name="name">Name of the last folder, for example <c>labwatch</c>.</param>
    public static string DefaultPath(string name)
    {
        // systemd hands over the directory of StateDirectory= in this variable.
        if (Environment.GetEnvironmentVariable("STATE_DIRECTORY") is { Length: > 0 } state)
        {
            return state.Split(':')[0];
        }

        Environment.SpecialFolder place = OperatingSystem.IsWindows() && !Environment.UserInteractive
            ? Environment.SpecialFolder.CommonApplicationData
            : Environment.SpecialFolder.LocalApplicationData;
        string root = Environment.GetFolderPath(place, Environment.SpecialFolderOption.DoNotVerify);
        return System.IO.Path.Combine(root.Length > 0 ? root : AppContext.BaseDirectory, name);
    }

    /// <summary>Makes the directory where it is missing, and takes its lock.</summary>
    /// <returns>The directory, or the finding that says why not.</returns>
    public static (DataDirectory? Directory, Finding? Finding) Open(string path)
    {
        string full = System.IO.Path.GetFullPath(path);
        string lockFile = System.IO.Path.Combine(full, "labwatch.lock");
        try
        {
            Directory.CreateDirectory(full);
            if (File.Exists(System.IO.Path.Combine(full, Backup.DataFiles.RestoreMarker)))
            {
                return (null, new Finding("restore-incomplete", "--data", "A restore into this directory did not come to its end.", full, "Delete the directory and restore the backup again."));
            }

            MakePrivate(System.IO.Path.Combine(full, "keys"));
            FileStream held = new(lockFile, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
            return (new DataDirectory(full, held), null);
        }
        catch (UnauthorizedAccessException)
        {
            return (null, new Finding("data-not-writable", "--data", "The data directory cannot be written.", full, "Give the service's account the right to write there, or choose another directory."));
        }
        catch (IOException exception) when (File.Exists(lockFile))
        {
            return (null, new Finding("data-in-use", "--data", "Another LabWatch is using this data directory: " + exception.Message, full, "Stop the other one, or choose another directory."));
        }
        catch (IOException exception)
        {
            return (null, new Finding("data-not-usable", "--data", "The data directory cannot be used: " + exception.Message, full, "Choose a directory on a local disk."));
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _lock.Dispose();

    private static void MakePrivate(string path)
    {
        if (OperatingSystem.IsWindows())
        {
            Directory.CreateDirectory(path);
        }
        else
        {
            Directory.CreateDirectory(path, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
        }
    }
}
