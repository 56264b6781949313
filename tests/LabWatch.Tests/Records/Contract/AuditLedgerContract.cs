using System.Security.Cryptography;
using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;
using LabWatch.Records.Audit;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's audit trail does.</summary>
public abstract class AuditLedgerContract : IAsyncLifetime
{
    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private IRecordsUnderTest _records = null!;

    private IAuditLedger Ledger => _records.Audit;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task Each_site_has_a_chain_of_its_own_without_gaps()
    {
        Assert.Null(await Ledger.HeadAsync("hollin-vale", Token));
        await Ledger.AppendAsync(Note("hollin-vale", "signed-in", "account/kim"), Token);
        await Ledger.AppendAsync(Note("other", "signed-in", "account/lee"), Token);
        await Ledger.AppendAsync([Note("hollin-vale", "signed-out", "account/kim"), Note("hollin-vale", "signed-in", "account/pat")], null, Token);
        AuditPage page = await Ledger.ListAsync(new AuditQuery("hollin-vale", 10), Token);
        Assert.Equal([3, 2, 1], page.Items.Select(entry => entry.Sequence));
        Assert.Equal(new string('0', 64), page.Items[2].Previous);
        Assert.Equal(page.Items[2].Digest, page.Items[1].Previous);
        Assert.Equal(page.Items[1].Digest, page.Items[0].Previous);
        Assert.Equal(new AuditHead(3, page.Items[0].Digest), page.Head);
        Assert.Equal(page.Head, await Ledger.HeadAsync("hollin-vale", Token));
        Assert.Equal(1, (await Ledger.HeadAsync("other", Token))!.Sequence);
    }

    [Fact]
    public async Task The_digest_is_that_of_the_entry_as_anybody_writes_it()
    {
        JsonObject content = new() { ["b"] = 1, ["a"] = "\u20ac \"quoted\"\n\u0001\ud83d\ude00", ["A"] = new JsonArray(true, null, 0.002, 1500) };
        await Ledger.AppendAsync(Note("hollin-vale", "set-up-done", "account/kim") with { Content = content, RecordDigest = new string('a', 64) }, Token);
        await Ledger.AppendAsync(Note("hollin-vale", "signed-in", "account/kim") with { At = Sample.Noon }, Token);
        foreach (AuditEntry entry in (await Ledger.ListAsync(new AuditQuery("hollin-vale", 10), Token)).Items)
        {
            Assert.Equal(Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(Independent(entry)))), entry.Digest);
        }
    }

    [Fact]
    public async Task Entries_are_listed_by_pages_and_filters()
    {
        await Ledger.AppendAsync(
            [.. Enumerable.Range(0, 10).Select(i => Note("hollin-vale", i % 2 == 0 ? "signed-in" : "signed-out", $"account/{i}") with { At = Sample.Noon + TimeSpan.FromSeconds(i) })],
            null,
            Token);
        AuditPage first = await Ledger.ListAsync(new AuditQuery("hollin-vale", 4), Token);
        AuditPage second = await Ledger.ListAsync(new AuditQuery("hollin-vale", 20) { Before = first.Next }, Token);
        Assert.Equal([10, 9, 8, 7], first.Items.Select(entry => entry.Sequence));
        Assert.Equal([6, 5, 4, 3, 2, 1], second.Items.Select(entry => entry.Sequence));
        Assert.Null(second.Next);
        Assert.Equal((long[])[9, 7, 5, 3, 1], await NumbersAsync(query => query with { Action = "signed-in" }));
        Assert.Equal((long[])[3], await NumbersAsync(query => query with { Subject = "account/2" }));
        Assert.Equal(10, (await NumbersAsync(query => query with { Subject = "account/" })).Length);
        Assert.Empty(await NumbersAsync(query => query with { Actor = "nobody" }));
        Assert.Equal((long[])[6, 5], await NumbersAsync(query => query with { From = Sample.Noon + TimeSpan.FromSeconds(4), To = Sample.Noon + TimeSpan.FromSeconds(6) }));
    }

    [Fact]
    public async Task A_record_and_its_entry_are_written_together_and_once()
    {
        await _records.Assessments.RecordAsync([Sample.Assessment(Sample.Fir, 0), Sample.Assessment(Sample.Fir, 1)], Token);
        await _records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 1), Token);
        Alert alert = Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon);
        await _records.Alerts.RecordAsync(Sample.Raised(alert), [], Token);
        await _records.Alerts.RecordAsync(Sample.Raised(alert), [], Token);
        AlertTransition acknowledged = new(alert with { State = AlertState.RaisedAcknowledged, AcknowledgedBy = "kim" }, 2, Sample.Noon + TimeSpan.FromMinutes(1), "acknowledged", "kim", "Seen.");
        await _records.Alerts.RecordAsync(acknowledged, [], Token);
        IReadOnlyList<AuditEntry> entries = [.. (await Ledger.ListAsync(new AuditQuery("hollin-vale", 50), Token)).Items.Reverse()];
        Assert.Equal(
            ["assessment-recorded", "assessment-recorded", "alert-opened", "alert-step", "alert-step"],
            entries.Select(entry => entry.Action));
        Assert.Equal(
            [$"assessment/{Sample.Assessment(Sample.Fir, 0).Id}", $"assessment/{Sample.Assessment(Sample.Fir, 1).Id}", $"alert/{alert.Id}", $"alert/{alert.Id}/1", $"alert/{alert.Id}/2"],
            entries.Select(entry => entry.Subject));
        Assert.Equal(["labwatch", "labwatch", "labwatch", "labwatch", "kim"], entries.Select(entry => entry.Actor));
        Assert.All(entries, entry => Assert.Equal(64, entry.RecordDigest!.Length));
    }

    [Fact]
    public async Task A_note_that_has_no_canonical_form_appends_nothing_at_all()
    {
        AuditNote[] notes = [Note("hollin-vale", "signed-in", "account/kim"), Note("hollin-vale", "signed-in", "account/\ud800")];
        await Assert.ThrowsAnyAsync<ArgumentException>(async () => await Ledger.AppendAsync(notes, ("reader", 7), Token));
        Assert.Null(await Ledger.HeadAsync("hollin-vale", Token));
    }

    /// <summary>The canonical form by another way: the serialiser of the base library on members that were sorted by hand.</summary>
    private static string Independent(AuditEntry entry) => Text(new JsonObject
    {
        ["action"] = entry.Action,
        ["actor"] = entry.Actor,
        ["at"] = entry.At.ToString(),
        ["content"] = Sorted(entry.Content),
        ["previous"] = entry.Previous,
        ["recordDigest"] = entry.RecordDigest,
        ["sequence"] = entry.Sequence,
        ["site"] = entry.Site,
        ["subject"] = entry.Subject,
    });

    private static JsonObject Sorted(JsonObject content) =>
        new(content.OrderBy(member => member.Key, StringComparer.Ordinal).Select(member => KeyValuePair.Create(member.Key, member.Value?.DeepClone())));

    // The serialiser writes code units of a surrogate pair and \u0001 as RFC 8785 does only after these two replacements.
    private static string Text(JsonObject value) => value.ToJsonString(new JsonSerializerOptions { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping })
        .Replace("\\uD83D\\uDE00", "\ud83d\ude00", StringComparison.Ordinal);

    private static AuditNote Note(string site, string action, string subject) =>
        new(site, Sample.Noon + TimeSpan.FromMilliseconds(250), "kim", action, subject, new JsonObject(), null);

    private async Task<long[]> NumbersAsync(Func<AuditQuery, AuditQuery> filter) =>
        [.. (await Ledger.ListAsync(filter(new AuditQuery("hollin-vale", 50)), Token)).Items.Select(entry => entry.Sequence)];
}
