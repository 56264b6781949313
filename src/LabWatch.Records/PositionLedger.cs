using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records;

/// <summary>The positions in the records database.</summary>
internal sealed class PositionLedger(RecordsDatabase database) : IPositionLedger
{
    /// <summary>Readers of today look at all sites.</summary>
    private const string AllSites = "";

    public ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken) =>
        database.ReadAsync(
            context => context.Positions.Where(row => row.Site == AllSites && row.Reader == reader).Select(row => row.Position)
                .FirstOrDefaultAsync(cancellationToken),
            cancellationToken);

    public async ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                await MoveAsync(context, reader, position, cancellationToken);
                return 0;
            },
            cancellationToken);

    /// <summary>Stores a position inside the caller's transaction.</summary>
    public static async Task MoveAsync(RecordsContext context, string reader, long position, CancellationToken cancellationToken)
    {
        PositionRow? row = await context.Positions.FindAsync([AllSites, reader], cancellationToken);
        if (row is null)
        {
            context.Positions.Add(new PositionRow { Site = AllSites, Reader = reader, Position = position });
        }
        else
        {
            row.Position = position;
        }
    }
}
