using System.Runtime.InteropServices;

namespace LabWatch.Intake.Spool;

/// <summary>
/// Makes the entry of a new file in its directory durable. POSIX wants the directory itself synchronised; on Windows the file's own
/// flush does it, and directories cannot be opened for it.
/// </summary>
internal static class DirectoryFlush
{
    private const int ReadOnly = 0;

    public static void Flush(string directory)
    {
        if (OperatingSystem.IsWindows())
        {
            return;
        }

        int handle = NativeMethods.Open(directory, ReadOnly);
        if (handle < 0)
        {
            throw new IOException($"The directory {directory} cannot be opened to be synchronised (errno {Marshal.GetLastPInvokeError()}).");
        }

        int result = NativeMethods.Synchronise(handle);
        int error = Marshal.GetLastPInvokeError();
        _ = NativeMethods.Close(handle);
        if (result != 0)
        {
            throw new IOException($"The directory {directory} cannot be synchronised (errno {error}).");
        }
    }

    private static class NativeMethods
    {
        [DllImport("libc", EntryPoint = "open", SetLastError = true, BestFitMapping = false, ThrowOnUnmappableChar = true)]
        [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
        public static extern int Open([MarshalAs(UnmanagedType.LPUTF8Str)] string path, int flags);

        [DllImport("libc", EntryPoint = "fsync", SetLastError = true)]
        [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
        public static extern int Synchronise(int handle);

        [DllImport("libc", EntryPoint = "close", SetLastError = true)]
        [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
        public static extern int Close(int handle);
    }
}
