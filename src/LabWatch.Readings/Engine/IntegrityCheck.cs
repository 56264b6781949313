using System.Data.Common;
using System.Security.Cryptography;
using LabWatch.Readings.Blocks;

namespace LabWatch.Readings.Engine;

/// <summary>Compares sealed bytes with the digest beside them. The trail holds the same digests; <c>labwatch verify</c> compares with those.</summary>
internal sealed class IntegrityCheck(ReaderPool readers, StoreIncidents incidents)
{
    public IntegrityBatch Run(long after, int count, CancellationToken cancellationToken) => readers.Use(connection =>
    {
        IntegrityBatch batch = new(after, 0, 0);
        using DbDataReader reader = connection.Query(StoreDialect.BlocksToCheck, after, count);
        while (reader.Read())
        {
            cancellationToken.ThrowIfCancellationRequested();
            long id = reader.GetInt64(0);
            byte[] expected = reader.GetFieldValue<byte[]>(reader.IsDBNull(2) ? 1 : 2);
            bool isRight = IsRight(id, reader.GetFieldValue<byte[]>(3), expected);
            batch = new IntegrityBatch(id, batch.Parts + 1, batch.Wrong + (isRight ? 0 : 1));
        }

        return batch;
    });

    private bool IsRight(long id, byte[] data, byte[] expected)
    {
        if (SHA256.HashData(data).AsSpan().SequenceEqual(expected))
        {
            return true;
        }

        incidents.Report(StoreIncidents.DigestKind, id, "The sealed bytes do not have the digest that was stored with them.");
        try
        {
            SealedBlock.Open(data);
        }
        catch (DamagedDataException damage)
        {
            incidents.ReportBlock(id, damage);
        }

        return false;
    }
}
