namespace LabWatch.Intake.Spool;

/// <summary>The intact entries of one spool file, and what was found between them.</summary>
/// <param name="Entries">The entries in the order in which they were written.</param>
/// <param name="Damaged">Spans of bytes before the last intact entry that are no entries.</param>
/// <param name="TornTail">Whether bytes follow the last intact entry: the write that a crash cut off, never acknowledged.</param>
internal sealed record SpoolFile(IReadOnlyList<SpoolEntry> Entries, int Damaged, bool TornTail)
{
    /// <summary>Reads the bytes of a file. Any bytes give a result; after damage, reading goes on at the next intact entry.</summary>
    public static SpoolFile Parse(ReadOnlySpan<byte> bytes)
    {
        var entries = new List<SpoolEntry>();
        int damaged = 0;
        bool inDamage = !bytes.StartsWith(SpoolCodec.FileHeader);
        int position = inDamage ? 0 : SpoolCodec.FileHeader.Length;
        while (position < bytes.Length)
        {
            if (SpoolCodec.TryRead(bytes[position..], out SpoolEntry entry, out int length))
            {
                damaged += inDamage ? 1 : 0;
                inDamage = false;
                entries.Add(entry);
                position += length;
                continue;
            }

            inDamage = true;
            int next = bytes[(position + 1)..].IndexOf(SpoolCodec.Marker);
            position = next < 0 ? bytes.Length : position + 1 + next;
        }

        return new SpoolFile(entries, damaged, inDamage);
    }
}
