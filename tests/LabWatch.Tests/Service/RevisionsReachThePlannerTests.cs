using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records.Revisions;
using LabWatch.Service.Hosting;
using LabWatch.Tests.Assessments;
using LabWatch.Tests.Records;

namespace LabWatch.Tests.Service;

/// <summary>From a revision on record through the document in force to the assessments that it supersedes.</summary>
public sealed class RevisionsReachThePlannerTests : IAsyncLifetime
{
    private const string File = """
        {
          "format": "labwatch-lab/1",
          "site": { "id": "hollin-vale", "name": "Hollin Vale", "timeZone": "UTC" },
          "sources": [ {
            "id": "rowan", "name": "Rowan", "kind": "block-furnace", "route": "contact", "range": { "minimumCelsius": 100, "maximumCelsius": 500 },
            "bands": [ { "id": "lw", "name": "8 to 14 um", "lowerMicrometre": 8, "upperMicrometre": 14 } ],
            "cavity": { "shape": "cylinder", "radiusMillimetre": 20, "lengthMillimetre": 200,
              "coating": [ { "band": "lw", "emissivity": { "value": 0.95, "standardUncertainty": 0.01 }, "diffuseFraction": { "value": 0.9, "standardUncertainty": 0.05 } } ] },
            "channels": [
              { "id": "well-1", "name": "Well 1", "quantity": "well-thermometer", "unit": "Cel", "intervalSeconds": 10, "axialPositionMillimetre": 190, "reference": true },
              { "id": "set-point", "name": "Set point", "quantity": "set-point", "unit": "Cel", "intervalSeconds": 10 }
            ] } ],
          "instruments": [ { "id": "ind-1", "serialNumber": "0042", "description": "Indicating thermometer",
            "installations": [ { "source": "rowan", "channel": "well-1", "from": "2026-09-01T00:00:00Z" } ],
            "certificates": [ { "id": "cal-well", "revision": 1, "number": "HV-2026-11", "issuer": "Invented", "validFrom": "2026-09-01T00:00:00Z",
              "range": { "minimumCelsius": 100, "maximumCelsius": 500 },
              "characteristic": { "kind": "correction-table", "expandedUncertaintyKelvin": 0.03, "coverageFactor": 2,
                "points": [ { "indicatedCelsius": 100, "correctionKelvin": 0 }, { "indicatedCelsius": 500, "correctionKelvin": 0 } ] } } ] } ],
          "limits": [ { "id": "rowan-stability", "revision": 1, "source": "rowan", "criterion": "stability", "maximum": 50, "unit": "mK", "rule": "guard-band", "effectiveFrom": "2026-09-01T00:00:00Z" } ]
        }
        """;

    private static readonly Instant Start = PlannerHarness.Start;
    private static readonly Instant Between = Start + TimeSpan.FromHours(1);

    private SqliteRecords _records = null!;
    private LabSnapshotSource _lab = null!;
    private PlannerHarness _planner = null!;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync()
    {
        _records = await SqliteRecords.CopyAsync();
        LabImportOutcome import = await ImportAsync(File, Start - TimeSpan.FromDays(1));
        _lab = LabSnapshotSource.Of(import.Records!.Compose()!, Path.Combine(_records.Directory, "lab-in-force.json")).Source!;
        _planner = await PlannerHarness.NewAsync();
        _lab.Changed += (_, _) => _planner.Snapshots.Exchange(_lab.Current);
        _planner.Snapshots.Exchange(_lab.Current);
        _planner.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(2)));
        _planner.Clock.AdvanceTo(Start + TimeSpan.FromHours(2) + TimeSpan.FromMinutes(1));
        await _planner.RunQuietAsync();
    }

    public async ValueTask DisposeAsync()
    {
        await _planner.DisposeAsync();
        await _records.DisposeAsync();
    }

    [Fact]
    public async Task A_corrected_certificate_supersedes_every_window_that_rests_on_it()
    {
        IReadOnlyList<Assessment> before = InOrder(await _planner.RecordedAsync());
        Assert.NotEmpty(before);
        JsonObject corrected = LabDocument.Split(LabDocument.Parse(Encoding.UTF8.GetBytes(File))).Single(entry => entry.Kind == LabRecordKind.Certificate).Content;
        (corrected["revision"], corrected["number"]) = (2, "HV-2026-11 corrected");
        IReadOnlyList<Assessment> superseding = await AfterAsync(LabRecordKind.Certificate, corrected);
        Assert.Equal(before.Select(item => item.Window), superseding.Select(item => item.Window));
        Assert.All(superseding, item => Assert.Equal((2, "Certificate cal-well@2 is in force instead of cal-well@1."), (item.Revision, item.SupersedeReason)));
    }

    [Fact]
    public async Task A_limit_that_applies_from_a_past_instant_supersedes_from_there_on_only()
    {
        IReadOnlyList<Assessment> before = InOrder(await _planner.RecordedAsync());
        JsonObject limit = LabDocument.Split(LabDocument.Parse(Encoding.UTF8.GetBytes(File))).Single(entry => entry.Kind == LabRecordKind.Limit).Content;
        (limit["revision"], limit["maximum"], limit["effectiveFrom"]) = (2, 1, Between.ToString());
        IReadOnlyList<Assessment> superseding = await AfterAsync(LabRecordKind.Limit, limit);
        Assert.Equal(before.Select(item => item.Window).Where(window => window.End >= Between), superseding.Select(item => item.Window));
        Assert.All(superseding, item => Assert.Equal("rowan-stability@2", item.Provenance.Limit));
    }

    [Fact]
    public async Task A_source_described_anew_from_a_past_instant_is_judged_anew_from_there_on_only()
    {
        IReadOnlyList<Assessment> before = InOrder(await _planner.RecordedAsync());
        Assert.All(before, item => Assert.Equal("rowan@1", item.Provenance.Source));
        int count = before.Count;
        LabImportOutcome import = await ImportAsync(
            File.Replace("\"name\": \"Rowan\"", $"\"name\": \"Rowan, recoated\", \"effectiveFrom\": \"{Between}\"", StringComparison.Ordinal), Start + TimeSpan.FromHours(2));
        Assert.Empty(import.Refused);
        Assert.Empty(_lab.Adopt(import.Records!));
        await _planner.RunAsync();
        IReadOnlyList<Assessment> superseding = InOrder((await _planner.RecordedAsync()).Skip(count));
        Assert.Equal(before.Select(item => item.Window).Where(window => window.End >= Between), superseding.Select(item => item.Window));
        Assert.All(superseding, item => Assert.Equal("rowan@2", item.Provenance.Source));
    }

    private async Task<IReadOnlyList<Assessment>> AfterAsync(LabRecordKind kind, JsonObject content)
    {
        int count = (await _planner.RecordedAsync()).Count;
        RevisionOutcome outcome = await _records.LabRecords.ReviseAsync(
            new RevisionOrder("hollin-vale", kind, content, "lee", "Corrected", Start + TimeSpan.FromHours(2)), Token);
        Assert.True(outcome.IsNew);
        Assert.Empty(_lab.Adopt(outcome.Records!));
        await _planner.RunAsync();
        return InOrder((await _planner.RecordedAsync()).Skip(count));
    }

    private static IReadOnlyList<Assessment> InOrder(IEnumerable<Assessment> assessments) => [.. assessments.OrderBy(item => item.Window.End)];

    private ValueTask<LabImportOutcome> ImportAsync(string file, Instant at) =>
        _records.LabRecords.ImportAsync(new LabImportOrder(Encoding.UTF8.GetBytes(file), "lab.json", "os/kim", at), Token);
}
