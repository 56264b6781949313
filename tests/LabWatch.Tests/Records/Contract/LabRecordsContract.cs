using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.LabFile;
using LabWatch.Records.Audit;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Revisions;
using LabWatch.Tests.Lab;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's versioned records do.</summary>
public abstract class LabRecordsContract : IAsyncLifetime
{
    private const string Site = "sample";
    private static readonly TimeSpan Day = TimeSpan.FromDays(1);

    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private IRecordsUnderTest _records = null!;

    private ILabRecords Records => _records.LabRecords;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task An_import_puts_every_entry_on_record_and_composes_to_the_same_site()
    {
        LabImportOutcome outcome = await ImportAsync(LabFileSample.Text);
        Assert.Empty(outcome.Refused);
        Assert.Equal(12, outcome.Plan.Revisions.Count);
        LabRecordSet read = await Records.ReadAsync(Site, Token);
        Assert.Equal(outcome.Records!.Revisions, read.Revisions);
        Assert.Equal(Enumerable.Range(1, 12).Select(number => (long)number), read.Revisions.Select(revision => revision.Sequence));
        Assert.All(read.Revisions, revision => Assert.Equal(("os/kim", 1, "Import of lab.json, digest " + read.LatestImport!.Digest[..12]), (revision.Author, revision.Import, revision.Reason)));
        Assert.Equal([Site], await Records.SitesAsync(Token));
        Assert.Equal(12, await Records.HeadAsync(Site, Token));
        LabSnapshot expected = LabFileReader.Read(Encoding.UTF8.GetBytes(LabFileSample.Text)).Snapshot!;
        LabSnapshot snapshot = Snapshot(read);
        Assert.Equivalent(expected.Instruments, snapshot.Instruments);
        Assert.Equivalent(expected.Certificates, snapshot.Certificates);
        Assert.Equivalent(expected.Installations, snapshot.Installations);
        Assert.Equivalent(expected.Limits, snapshot.Limits);
        Assert.Equivalent(expected.Notifiers, snapshot.Notifiers);
        Assert.Equivalent(expected.Sources.Select(source => source with { EffectiveFrom = Sample.Noon }), snapshot.Sources);
    }

    [Fact]
    public async Task The_file_itself_stays_byte_for_byte_with_its_digest()
    {
        LabImport import = (await ImportAsync(LabFileSample.Text)).Import!;
        Assert.Equal((1, "os/kim", LabFileSample.Text), (import.Sequence, import.By, import.Document));
        Assert.Equal(import, Assert.Single(await _records.LabImports.ListAsync(Site, Token)));
        Assert.Equal(import, await _records.LabImports.LatestAsync(Site, Token));
    }

    [Fact]
    public async Task The_same_file_again_changes_nothing_and_edits_stay_in_force()
    {
        await ImportAsync(LabFileSample.Text);
        RevisionOutcome edit = await ReviseAsync(LabRecordKind.Limit, Limit(2, 15));
        Assert.True(edit.IsNew);
        LabImportOutcome again = await ImportAsync(LabFileSample.Text, Day);
        Assert.Empty(again.Refused);
        Assert.Empty(again.Plan.Revisions);
        Assert.Equal(1, again.Import!.Sequence);
        Assert.Equal(15, Snapshot(again.Records!).LimitInForce(new SourceKey(Site, "fir"), "stability", 30, null, Sample.Noon)!.Maximum);
    }

    [Fact]
    public async Task A_changed_source_gets_a_revision_and_what_was_before_is_judged_by_the_former_one()
    {
        await ImportAsync(LabFileSample.Text);
        LabImportOutcome changed = await ImportAsync(LabFileSample.Text.Replace("\"name\": \"Fir\"", "\"name\": \"Fir, recoated\"", StringComparison.Ordinal), Day, reason: "Recoated");
        RecordRevision revision = Assert.Single(changed.Plan.Revisions);
        Assert.Equal(("fir@2", "Recoated", Sample.Noon + Day), (revision.Reference, revision.Reason, revision.EffectiveFrom));
        LabSnapshot lab = Snapshot(changed.Records!);
        SourceKey fir = lab.Sources[0].Key;
        Assert.Equal("Fir", lab.SourceInForce(fir, Sample.Noon)!.Name);
        Assert.Equal("Fir, recoated", lab.SourceInForce(fir, Sample.Noon + Day)!.Name);
        Assert.Equal("Fir, recoated", lab.FindSource(fir)!.Name);
    }

    [Fact]
    public async Task A_source_can_say_from_when_it_holds_but_not_from_a_time_to_come_or_before_the_former_one()
    {
        await ImportAsync(LabFileSample.Text);
        LabImportOutcome late = await ImportAsync(Recoated((Sample.Noon + Day + Day).ToString()), Day);
        Assert.Equal(("effective-later", "/sources/0/effectiveFrom"), Assert.Single(late.Refused.Select(finding => (finding.Code, finding.Where))));
        LabImportOutcome early = await ImportAsync(Recoated((Sample.Noon - Day).ToString()), Day);
        Assert.Equal("effective-earlier", Assert.Single(early.Refused).Code);
        LabImportOutcome good = await ImportAsync(Recoated((Sample.Noon + TimeSpan.FromHours(1)).ToString()), Day);
        Assert.Equal(Sample.Noon + TimeSpan.FromHours(1), Snapshot(good.Records!).Sources[0].EffectiveFrom);

        static string Recoated(string from) => LabFileSample.Text.Replace("\"name\": \"Fir\"", $"\"name\": \"Recoated\", \"effectiveFrom\": \"{from}\"", StringComparison.Ordinal);
    }

    [Fact]
    public async Task Other_content_under_a_revision_on_record_is_refused_and_nothing_is_changed()
    {
        await ImportAsync(LabFileSample.Text);
        LabImportOutcome outcome = await ImportAsync(
            LabFileSample.Text.Replace("\"maximum\": 20", "\"maximum\": 25", StringComparison.Ordinal).Replace("100.01", "100.02", StringComparison.Ordinal), Day, accept: true);
        Assert.Equal(["/instruments/0/certificates/0", "/limits/0"], outcome.Refused.Select(finding => finding.Where));
        Assert.All(outcome.Refused, finding => Assert.Equal("revision-changed", finding.Code));
        Assert.Contains("revision 2", outcome.Refused[0].Cure, StringComparison.Ordinal);
        Assert.Equal(12, await Records.HeadAsync(Site, Token));
        Assert.Single(await _records.LabImports.ListAsync(Site, Token));
    }

    [Fact]
    public async Task A_file_that_gives_the_next_revision_alone_keeps_the_former_ones()
    {
        await ImportAsync(LabFileSample.Text);
        LabImportOutcome outcome = await ImportAsync(
            LabFileSample.Text.Replace("\"id\": \"fir-stability\", \"revision\": 1", "\"id\": \"fir-stability\", \"revision\": 2", StringComparison.Ordinal)
                .Replace("\"maximum\": 20", "\"maximum\": 25", StringComparison.Ordinal), Day);
        Assert.Equal(["revised limit/fir-stability@2"], outcome.Plan.Changes.Select(change => $"{change.What} {change.Subject}"));
        Assert.Equal([1, 2], Snapshot(outcome.Records!).Limits.Select(limit => limit.Revision));
    }

    [Fact]
    public async Task A_later_revision_that_the_file_does_not_have_is_told_and_left_alone()
    {
        await ImportAsync(LabFileSample.Text);
        await ReviseAsync(LabRecordKind.Limit, Limit(2, 15));
        LabImportOutcome outcome = await ImportAsync(LabFileSample.Text + "\n", Day);
        Assert.Empty(outcome.Refused);
        Assert.Equal([new LabChange("kept", "limit/fir-stability@2")], outcome.Plan.Changes);
        Assert.Equal((2, 13), (outcome.Import!.Sequence, outcome.Records!.Sequence));
        LabImportOutcome both = await Records.ImportAsync(new LabImportOrder(outcome.Records.Compose()!, "copy.json", "os/kim", Sample.Noon + Day + Day), Token);
        Assert.Empty(both.Refused);
        Assert.Empty(both.Plan.Changes);
    }

    [Fact]
    public async Task What_the_file_would_revert_or_withdraw_is_refused_until_it_is_accepted()
    {
        await ImportAsync(LabFileSample.Text);
        await ReviseAsync(LabRecordKind.Certificate, Certificate("c-3", 1, "S-1 recalibrated"));
        string changed = LabFileSample.Text.Replace("\"id\": \"gateway\"", "\"id\": \"phones\"", StringComparison.Ordinal);
        LabImportOutcome refused = await ImportAsync(changed, Day);
        Assert.Equal(["edit-withdrawn c-3@1", "withdrawn gateway@1"], refused.Refused.Select(finding => $"{finding.Code} {finding.Value}").Order());
        Assert.Contains("--accept", refused.Refused[0].Cure, StringComparison.Ordinal);
        Assert.Equal(13, await Records.HeadAsync(Site, Token));

        LabImportOutcome looked = await ImportAsync(changed, Day, accept: true, dryRun: true);
        Assert.Equal(["added notifier/phones@1", "withdrawn certificate/c-3@2", "withdrawn notifier/gateway@2"], looked.Plan.Changes.Select(change => $"{change.What} {change.Subject}").Order());
        Assert.Equal(13, await Records.HeadAsync(Site, Token));

        LabImportOutcome accepted = await ImportAsync(changed, Day, accept: true);
        Assert.Equal(16, await Records.HeadAsync(Site, Token));
        LabSnapshot lab = Snapshot(accepted.Records!);
        Assert.Equal(["phones"], lab.Notifiers.Select(notifier => notifier.Id));
        Assert.Equal(Sample.Noon + Day, lab.Certificates.Single(certificate => certificate.Id == "c-3").WithdrawnFrom);
        Assert.True((await Records.ReadAsync(Site, Token)).Revisions[^1].IsWithdrawal);
    }

    [Fact]
    public async Task A_withdrawn_limit_is_restored_under_the_next_revision_only()
    {
        await ImportAsync(LabFileSample.Text);
        JsonObject without = LabDocument.Parse(Encoding.UTF8.GetBytes(LabFileSample.Text));
        without.Remove("limits");
        await ImportAsync(without.ToJsonString(), Day, accept: true);
        LabImportOutcome again = await ImportAsync(LabFileSample.Text, Day + Day);
        Assert.Equal("revision-withdrawn", Assert.Single(again.Refused).Code);
        LabImportOutcome restored = await ImportAsync(LabFileSample.Text.Replace("\"fir-stability\", \"revision\": 1", "\"fir-stability\", \"revision\": 3", StringComparison.Ordinal), Day + Day);
        Assert.Empty(restored.Refused);
        Assert.Null(Snapshot(restored.Records!).Limits[^1].WithdrawnFrom);
    }

    [Fact]
    public async Task A_withdrawn_stay_ends_and_a_withdrawn_source_stays_known_for_its_past()
    {
        JsonObject two = LabDocument.Parse(Encoding.UTF8.GetBytes(LabFileSample.Text));
        JsonObject oak = two["sources"]![0]!.DeepClone().AsObject();
        oak["id"] = "oak";
        two["sources"]!.AsArray().Add(oak);
        two["instruments"]![2]!["installations"]!.AsArray().Add(JsonNode.Parse("""{ "source": "oak", "channel": "lip", "from": "2026-03-01T00:00:00Z" }"""));
        await ImportAsync(two.ToJsonString());
        LabImportOutcome outcome = await ImportAsync(LabFileSample.Text, Day, accept: true);
        Assert.Empty(outcome.Refused);
        LabSnapshot lab = Snapshot(outcome.Records!);
        Assert.Null(lab.FindSource(new SourceKey(Site, "oak")));
        Assert.NotNull(lab.SourceInForce(new SourceKey(Site, "oak"), Sample.Noon));
        Assert.Equal(Sample.Noon + Day, lab.Installations.Single(stay => stay.Channel.Source.Source == "oak").Until);
    }

    [Fact]
    public async Task An_edit_is_checked_like_a_file_with_findings_at_its_own_members()
    {
        await ImportAsync(LabFileSample.Text);
        JsonObject wrong = Limit(2, -3);
        wrong["source"] = "ash";
        wrong["colour"] = "green";
        RevisionOutcome outcome = await ReviseAsync(LabRecordKind.Limit, wrong);
        Assert.Equal(["/colour", "/maximum", "/source"], outcome.Findings.Select(finding => finding.Where).Order());
        Assert.Equal("/instrument", Assert.Single((await ReviseAsync(LabRecordKind.Certificate, Limit(1, 1))).Findings).Where);
        Assert.NotEmpty((await ReviseAsync(LabRecordKind.Limit, [])).Findings);
        Assert.Equal(12, await Records.HeadAsync(Site, Token));
    }

    [Fact]
    public async Task An_edit_gives_the_next_revision_and_the_same_again_changes_nothing()
    {
        await ImportAsync(LabFileSample.Text);
        Assert.Equal("revision-not-next", (await ReviseAsync(LabRecordKind.Limit, Limit(3, 15))).Conflict!.Code);
        Assert.Equal("revision-not-next", (await ReviseAsync(LabRecordKind.Limit, Limit(1, 15))).Conflict!.Code);
        RevisionOutcome first = await ReviseAsync(LabRecordKind.Limit, Limit(2, 15));
        RevisionOutcome again = await ReviseAsync(LabRecordKind.Limit, Limit(2, 15));
        Assert.Equal((true, false), (first.IsNew, again.IsNew));
        Assert.Equal(first.Revision, again.Revision);
        Assert.Null(first.Revision!.Import);
        Assert.Equal(13, await Records.HeadAsync(Site, Token));
    }

    [Fact]
    public async Task Before_the_first_import_nothing_can_be_edited() =>
        Assert.Equal("no-lab", (await ReviseAsync(LabRecordKind.Limit, Limit(1, 15))).Conflict!.Code);

    [Fact]
    public async Task Every_revision_and_import_has_its_entry_in_the_trail()
    {
        await ImportAsync(LabFileSample.Text);
        await ReviseAsync(LabRecordKind.Limit, Limit(2, 15));
        string[] entries = [.. (await _records.Audit.ListAsync(new AuditQuery(Site, 100), Token)).Items
            .OrderBy(entry => entry.Sequence).Select(entry => $"{entry.Actor} {entry.Action} {entry.Subject}")];
        Assert.Equal(14, entries.Length);
        Assert.Equal("os/kim lab-file-imported lab-import/1", entries[0]);
        Assert.Contains("os/kim record-revised record/installation/prt-1/fir/well-1/2026-01-01T00:00:00Z@1", entries);
        Assert.Equal("lee record-revised record/limit/fir-stability@2", entries[^1]);
    }

    [Theory]
    [InlineData("not json", "not-json")]
    [InlineData("{}", "missing")]
    public async Task A_file_that_is_wrong_is_refused(string text, string code) =>
        Assert.Contains((await ImportAsync(text)).Refused, finding => finding.Code == code);

    private ValueTask<LabImportOutcome> ImportAsync(string text, TimeSpan later = default, bool accept = false, bool dryRun = false, string? reason = null) =>
        Records.ImportAsync(
            new LabImportOrder(Encoding.UTF8.GetBytes(text), "lab.json", "os/kim", Sample.Noon + later) { Accept = accept, DryRun = dryRun, Reason = reason }, Token);

    private ValueTask<RevisionOutcome> ReviseAsync(LabRecordKind kind, JsonObject content) =>
        Records.ReviseAsync(new RevisionOrder(Site, kind, content, "lee", "Tightened", Sample.Noon + TimeSpan.FromHours(1)), Token);

    private static LabSnapshot Snapshot(LabRecordSet records)
    {
        LabFileResult result = LabFileReader.Read(records.Compose()!);
        Assert.Empty(result.Findings);
        return result.Snapshot!;
    }

    private static JsonObject Limit(int revision, double maximum) => JsonNode.Parse(FormattableString.Invariant(
        $$"""{ "id": "fir-stability", "revision": {{revision}}, "source": "fir", "criterion": "stability", "maximum": {{maximum}}, "unit": "mK", "rule": "guard-band", "effectiveFrom": "2026-06-01T00:00:00Z" }"""))!.AsObject();

    private static JsonObject Certificate(string id, int revision, string number)
    {
        JsonObject certificate = LabDocument.Parse(Encoding.UTF8.GetBytes(LabFileSample.Text))["instruments"]![0]!["certificates"]![0]!.DeepClone().AsObject();
        (certificate["id"], certificate["revision"], certificate["number"], certificate["instrument"]) = (id, revision, number, "prt-1");
        certificate["validFrom"] = "2026-02-01T00:00:00Z";
        return certificate;
    }
}
