using System.Buffers;
using LabWatch.Alerts.Journal;

namespace LabWatch.Alerts.Recording;

/// <summary>Keeps entries that the ledger refuses, in the format of the journal, so that nothing is lost and the rest can go on.</summary>
internal sealed class SetAsideFile(string folder)
{
    /// <summary>Name of the file in the folder of the service's data.</summary>
    public const string FileName = "alerts.set-aside";

    /// <summary>Keeps an entry durably; the path of the file.</summary>
    public string Keep(JournalEntry entry)
    {
        string path = Path.Combine(folder, FileName);
        ArrayBufferWriter<byte> line = new();
        JournalLine.Write(entry, line);
        using FileStream stream = new(path, FileMode.Append, FileAccess.Write, FileShare.Read, bufferSize: 0);
        stream.Write(line.WrittenSpan);
        stream.Flush(flushToDisk: true);
        return path;
    }
}
