namespace LabWatch.Alerts.Journal;

/// <summary>What was read from a journal file.</summary>
/// <param name="Entries">The entries in order.</param>
/// <param name="DamagedLines">Lines that could not be read, besides a torn last one.</param>
/// <param name="SoundLength">Bytes up to the end of the last whole line.</param>
internal sealed record JournalContent(IReadOnlyList<JournalEntry> Entries, int DamagedLines, long SoundLength)
{
    /// <summary>Reads the bytes of a journal file. A last line without line feed was being written when the service stopped: it is left out.</summary>
    public static JournalContent Parse(ReadOnlySpan<byte> bytes)
    {
        List<JournalEntry> entries = [];
        int damaged = 0;
        int start = 0;
        while (bytes[start..].IndexOf((byte)'\n') is var length and >= 0)
        {
            ReadOnlySpan<byte> line = bytes.Slice(start, length);
            bool header = start == 0 && line.SequenceEqual(JournalLine.Header[..^1]);
            if (!header && JournalLine.Read(line) is { } entry)
            {
                entries.Add(entry);
            }
            else if (!header)
            {
                damaged++;
            }

            start += length + 1;
        }

        return new JournalContent(entries, damaged, start);
    }
}
