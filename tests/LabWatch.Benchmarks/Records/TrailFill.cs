using System.Buffers;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Records.Audit;
using Microsoft.Data.Sqlite;

namespace LabWatch.Benchmarks.Records;

/// <summary>Adds entries to a trail as fast as the file takes them: for measuring alone.</summary>
internal static class TrailFill
{
    /// <summary>Goes on with the chain of a site until it has a number of entries.</summary>
    public static void Add(string path, string site, long until)
    {
        using SqliteConnection connection = new($"Data Source={path};Pooling=False");
        connection.Open();
        (long last, byte[] previous) = End(connection, site);
        using SqliteTransaction transaction = connection.BeginTransaction();
        using SqliteCommand insert = connection.CreateCommand();
        insert.CommandText = "INSERT INTO audit_entries(site, sequence, at, actor, action, subject, content, record_digest, previous, digest) "
            + "VALUES (@site, @sequence, @at, 'kim', 'signed-in', 'account/kim', @content, NULL, @previous, @digest)";
        insert.Parameters.AddWithValue("@site", site);
        foreach (string name in (string[])["@sequence", "@at", "@content", "@previous", "@digest"])
        {
            insert.Parameters.AddWithValue(name, 0);
        }

        ArrayBufferWriter<byte> canonical = new(1024);
        for (long sequence = last + 1; sequence <= until; sequence++)
        {
            string content = $$"""{"from":"192.0.2.{{sequence % 250}}","session":{{sequence}}}""";
            long at = 1_796_126_400_000_000 + (sequence * 1_250_000);
            byte[] digest = Digest(canonical, site, sequence, at, content, previous);
            insert.Parameters["@sequence"].Value = sequence;
            insert.Parameters["@at"].Value = at;
            insert.Parameters["@content"].Value = content;
            insert.Parameters["@previous"].Value = previous;
            insert.Parameters["@digest"].Value = digest;
            insert.ExecuteNonQuery();
            previous = digest;
        }

        transaction.Commit();
    }

    private static (long Last, byte[] Digest) End(SqliteConnection connection, string site)
    {
        using SqliteCommand last = connection.CreateCommand();
        last.CommandText = "SELECT sequence, digest FROM audit_entries WHERE site = @site ORDER BY sequence DESC LIMIT 1";
        last.Parameters.AddWithValue("@site", site);
        using SqliteDataReader reader = last.ExecuteReader();
        reader.Read();
        return (reader.GetInt64(0), reader.GetFieldValue<byte[]>(1));
    }

    private static byte[] Digest(ArrayBufferWriter<byte> canonical, string site, long sequence, long at, string content, byte[] previous)
    {
        canonical.ResetWrittenCount();
        new CanonicalEntry
        {
            Site = Encoding.UTF8.GetBytes(site),
            Sequence = sequence,
            At = at,
            Actor = "kim"u8,
            Action = "signed-in"u8,
            Subject = "account/kim"u8,
            Content = Encoding.UTF8.GetBytes(content),
            RecordDigest = [],
            Previous = previous,
        }.Write(canonical);
        return SHA256.HashData(canonical.WrittenSpan);
    }
}
