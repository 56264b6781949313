using System.Collections.Concurrent;
using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using Microsoft.EntityFrameworkCore;
using Microsoft.Extensions.Logging;

namespace LabWatch.Records.Audit;

/// <summary>The ends of the chains as committed by this process, for the file beside the database.</summary>
internal sealed class TrailHeads(RecordsOptions options, TimeProvider clock, ILogger<TrailHeads> logger)
{
    private readonly ConcurrentDictionary<string, AuditHead> _heads = new(StringComparer.Ordinal);
    private volatile bool _isChanged;

    private bool HasDirectory => Path.IsPathFullyQualified(options.DataDirectory) && Directory.Exists(options.DataDirectory);

    /// <summary>Takes over what a transaction has committed.</summary>
    public void Note(IReadOnlyDictionary<string, AuditHead> committed)
    {
        foreach ((string site, AuditHead head) in committed)
        {
            _heads.AddOrUpdate(site, head, (_, known) => head.Sequence > known.Sequence ? head : known);
            _isChanged = true;
        }
    }

    /// <summary>Writes the file where something was committed since the last time.</summary>
    public void Write()
    {
        if (!_isChanged || !HasDirectory)
        {
            return;
        }

        _isChanged = false;
        try
        {
            TrailHeadFile.Write(options.DataDirectory, _heads, Instant.Now(clock));
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            _isChanged = true;
            RecordsLog.HeadNotWritten(logger, exception.Message);
        }
    }

    /// <summary>
    /// Compares the file of the last run with the chains, at the start and inside its transaction. A difference becomes an entry of the
    /// chain, and the file is put aside, so that going on does not cover it up.
    /// </summary>
    public async Task CompareAsync(RecordsContext context, CancellationToken cancellationToken)
    {
        if (!HasDirectory || TrailHeadFile.Read(options.DataDirectory) is not { } noted)
        {
            return;
        }

        foreach ((string site, AuditHead head) in noted)
        {
            byte[]? digest = await context.AuditEntries.Where(row => row.Site == site && row.Sequence == head.Sequence)
                .Select(row => row.Digest).FirstOrDefaultAsync(cancellationToken);
            if (digest is null || Convert.ToHexStringLower(digest) != head.Digest)
            {
                await EnterDifferenceAsync(context, site, head, cancellationToken);
            }
            else
            {
                _heads.TryAdd(site, (await AuditChain.HeadAsync(context, site, cancellationToken))!);
            }
        }
    }

    private async Task EnterDifferenceAsync(RecordsContext context, string site, AuditHead noted, CancellationToken cancellationToken)
    {
        AuditHead? found = await AuditChain.HeadAsync(context, site, cancellationToken);
        Instant now = Instant.Now(clock);
        string? kept = TrailHeadFile.SetAside(options.DataDirectory, now);
        RecordsLog.HeadDiffers(logger, site, noted.Sequence, found?.Sequence ?? 0);
        JsonObject content = new()
        {
            ["notedSequence"] = noted.Sequence,
            ["notedDigest"] = noted.Digest,
            ["foundSequence"] = found?.Sequence ?? 0,
            ["foundDigest"] = found?.Digest,
            ["keptAs"] = kept,
        };
        await AuditChain.AppendAsync(
            context, new AuditNote(site, now, AuditActor.Service, AuditActions.HeadDiffers, "trail/" + site, content, null), cancellationToken);
    }
}
