using System.Runtime.InteropServices;

namespace LabWatch.Alerts.Journal;

/// <summary>Makes a new or renamed file's entry in its folder durable. On Windows the file system does it by itself.</summary>
internal static class FolderFlush
{
    private const int ReadOnly = 0;

    /// <summary>Flushes a folder to the disk (fsync of POSIX.1-2017). A file system that cannot is left as it is.</summary>
    public static void Flush(string folder)
    {
        if (OperatingSystem.IsWindows())
        {
            return;
        }

        int descriptor = Open(folder, ReadOnly);
        if (descriptor >= 0)
        {
            _ = FileSync(descriptor);
            _ = Close(descriptor);
        }
    }

#pragma warning disable SYSLIB1054 // The generated form needs unsafe code in the whole project for three plain calls.
    [DllImport("libc", EntryPoint = "open", SetLastError = true, BestFitMapping = false, ThrowOnUnmappableChar = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int Open([MarshalAs(UnmanagedType.LPUTF8Str)] string path, int flags);

    [DllImport("libc", EntryPoint = "fsync", SetLastError = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int FileSync(int descriptor);

    [DllImport("libc", EntryPoint = "close", SetLastError = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int Close(int descriptor);
#pragma warning restore SYSLIB1054
}
