using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Blocks;

/// <summary>Qualities as runs: the byte, then how many times it stands.</summary>
internal static class QualityRuns
{
    public static void Write(ByteWriter writer, ReadOnlySpan<ReadingQuality> qualities)
    {
        for (int start = 0; start < qualities.Length;)
        {
            int end = start + 1;
            while (end < qualities.Length && qualities[end] == qualities[start])
            {
                end++;
            }

            writer.WriteByte((byte)qualities[start]);
            writer.WriteVarint(end - start);
            start = end;
        }
    }

    public static void Read(ref ByteReader reader, Span<ReadingQuality> qualities)
    {
        for (int start = 0; start < qualities.Length;)
        {
            ReadingQuality quality = (ReadingQuality)reader.ReadByte();
            int run = reader.ReadCount(qualities.Length - start);
            if (run == 0)
            {
                throw new DamagedDataException("A run of qualities is empty.");
            }

            qualities.Slice(start, run).Fill(quality);
            start += run;
        }
    }
}
