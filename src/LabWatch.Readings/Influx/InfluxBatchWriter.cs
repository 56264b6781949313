namespace LabWatch.Readings.Influx;

/// <summary>
/// Writes the points of a commit in requests of bounded size. Where the server refuses a request for what it says, the request is halved
/// until the points that are refused stand alone; the others are written. Many refused points are not the points' fault but the
/// server's: then the commit fails, and whoever sent it keeps it.
/// </summary>
internal sealed class InfluxBatchWriter(InfluxConnection connection, int batchPoints)
{
    /// <summary>More refused points than this in one commit mean that the server is not set up as it should be.</summary>
    public const int MostRefused = 16;

    /// <summary>Writes all points; gives those that the server refuses, with its reason.</summary>
    public async Task<List<(InfluxPoint Point, string Reason)>> WriteAsync(IEnumerable<InfluxPoint> points, CancellationToken cancellationToken)
    {
        List<(InfluxPoint, string)> refused = [];
        foreach (InfluxPoint[] batch in points.Chunk(batchPoints))
        {
            await WriteAsync(batch, refused, cancellationToken);
        }

        return refused;
    }

    private async Task WriteAsync(ArraySegment<InfluxPoint> batch, List<(InfluxPoint, string)> refused, CancellationToken cancellationToken)
    {
        try
        {
            await connection.WriteAsync(batch.Select(one => one.Line), cancellationToken);
        }
        catch (InfluxRefusedException error) when (batch.Count > 1)
        {
            RequireFew(refused, error);
            int half = batch.Count / 2;
            await WriteAsync(batch[..half], refused, cancellationToken);
            await WriteAsync(batch[half..], refused, cancellationToken);
        }
        catch (InfluxRefusedException error)
        {
            refused.Add((batch[0], error.Message));
            RequireFew(refused, error);
            if (batch[0].Pack is null)
            {
                throw new StoreUnavailableException($"{connection.Location} refuses the store's own points: {error.Message}", error);
            }
        }
    }

    private void RequireFew(List<(InfluxPoint, string)> refused, InfluxRefusedException error)
    {
        if (refused.Count > MostRefused)
        {
            throw new StoreUnavailableException($"{connection.Location} refuses many readings of one commit, so the cause is its set-up: {error.Message}", error);
        }
    }
}
