using System.Buffers;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Records.Audit.Covered;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Audit;

/// <summary>Appends to the chains of the sites, inside the caller's transaction: an entry stands and falls with what it tells of.</summary>
internal static class AuditChain
{
    /// <summary>Longest content in bytes: an entry tells of a record, it does not hold it.</summary>
    public const int LongestContent = 65_536;

    /// <summary>Appends an entry. Call it inside <see cref="RecordsDatabase.WriteAsync"/>, as often as there is something to tell.</summary>
    /// <exception cref="ArgumentException">A text has no canonical form, a digest is none, or the content is too long.</exception>
    public static async Task AppendAsync(RecordsContext context, AuditNote note, CancellationToken cancellationToken)
    {
        AuditHead? head = await HeadAsync(context, note.Site, cancellationToken);
        AuditEntryRow row = ToRow(note, head);
        context.AuditEntries.Add(row);
        context.ChainHeads[note.Site] = new AuditHead(row.Sequence, Convert.ToHexStringLower(row.Digest));
    }

    /// <summary>
    /// Appends an entry about a row of a covered table: its subject and its record digest are made here, by the code that checks them
    /// later. The row must have its final values.
    /// </summary>
    /// <param name="context">The context of the transaction.</param>
    /// <param name="row">The row, of a type that <see cref="CoveredTables"/> knows.</param>
    /// <param name="note">What to enter; subject and record digest are replaced.</param>
    /// <param name="cancellationToken">Cancels the read of the chain's end.</param>
    public static Task CoverAsync(RecordsContext context, object row, AuditNote note, CancellationToken cancellationToken)
    {
        (_, string subject, string digest) = CoveredRow.Describe(context, row);
        return AppendAsync(context, note with { Subject = subject, RecordDigest = digest }, cancellationToken);
    }

    /// <summary>The end of a chain, what this context has appended included; null while it is empty.</summary>
    public static async ValueTask<AuditHead?> HeadAsync(RecordsContext context, string site, CancellationToken cancellationToken)
    {
        if (context.ChainHeads.TryGetValue(site, out AuditHead? known))
        {
            return known;
        }

        var last = await context.AuditEntries.AsNoTracking().Where(row => row.Site == site).OrderByDescending(row => row.Sequence)
            .Select(row => new { row.Sequence, row.Digest }).FirstOrDefaultAsync(cancellationToken);
        return last is null ? null : new AuditHead(last.Sequence, Convert.ToHexStringLower(last.Digest));
    }

    private static AuditEntryRow ToRow(AuditNote note, AuditHead? head)
    {
        byte[] content = CanonicalJson.Write(note.Content);
        if (content.Length > LongestContent)
        {
            throw new ArgumentException($"The content of an audit entry is longer than {LongestContent} bytes.", nameof(note));
        }

        AuditEntryRow row = new()
        {
            Site = note.Site,
            Sequence = (head?.Sequence ?? 0) + 1,
            At = note.At.Microseconds,
            Actor = note.Actor,
            Action = note.Action,
            Subject = note.Subject,
            Content = Encoding.UTF8.GetString(content),
            RecordDigest = note.RecordDigest is { } digest ? ReadDigest(digest) : null,
            Previous = head is null ? new byte[SHA256.HashSizeInBytes] : Convert.FromHexString(head.Digest),
            Digest = [],
        };
        row.Digest = DigestOf(row, content);
        return row;
    }

    private static byte[] ReadDigest(string digest) => digest.Length == SHA256.HashSizeInBytes * 2
        ? Convert.FromHexString(digest)
        : throw new ArgumentException("A record digest has 64 hexadecimal digits.", nameof(digest));

    private static byte[] DigestOf(AuditEntryRow row, ReadOnlySpan<byte> content)
    {
        ArrayBufferWriter<byte> output = new(512 + content.Length);
        new CanonicalEntry
        {
            Site = Utf8(row.Site),
            Sequence = row.Sequence,
            At = row.At,
            Actor = Utf8(row.Actor),
            Action = Utf8(row.Action),
            Subject = Utf8(row.Subject),
            Content = content,
            RecordDigest = row.RecordDigest,
            Previous = row.Previous,
        }.Write(output);
        return SHA256.HashData(output.WrittenSpan);
    }

    // Half of a surrogate pair has no UTF-8: it throws rather than being replaced, so that the digest is that of the text stored.
    private static byte[] Utf8(string text) => StrictUtf8.GetBytes(text);

    private static readonly UTF8Encoding StrictUtf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);
}
