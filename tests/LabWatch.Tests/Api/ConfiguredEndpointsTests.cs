using System.Net;
using System.Text;
using System.Text.Json;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Records.Revisions;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Hosting;
using LabWatch.Tests.Api.Fakes;
using LabWatch.Tests.Lab;
using LabWatch.Tests.Records;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Api;

public sealed class ConfiguredEndpointsTests : IAsyncLifetime
{
    private const string Limit =
        """{ "id": "fir-stability", "revision": 2, "source": "fir", "criterion": "stability", "maximum": 15, "unit": "mK", "rule": "guard-band", "effectiveFrom": "2026-06-01T00:00:00Z", "reason": "Tightened after the audit" }""";

    private const string Certificate =
        """
        { "instrument": "prt-1", "id": "c-1", "revision": 2, "number": "N-1 corrected", "issuer": "Invented laboratory", "validFrom": "2026-01-01T00:00:00Z", "dueAt": "2027-01-01T00:00:00Z",
          "range": { "minimumCelsius": -40, "maximumCelsius": 250 }, "reason": "Misprint in R0",
          "characteristic": { "kind": "callendar-van-dusen", "expandedUncertaintyKelvin": 0.02, "coverageFactor": 2, "r0Ohm": 100.05, "a": 3.9083e-3, "b": -5.775e-7, "c": -4.183e-12 } }
        """;

    private SqliteRecords _records = null!;
    private LabSnapshotSource _lab = null!;
    private ApiHost _host = null!;
    private int _changed;

    public async ValueTask InitializeAsync()
    {
        _records = await SqliteRecords.CopyAsync();
        LabImportOutcome import = await _records.LabRecords.ImportAsync(
            new LabImportOrder(Encoding.UTF8.GetBytes(LabFileSample.Text), "lab.json", "os/kim", Instant.From(ApiHost.Start)), TestContext.Current.CancellationToken);
        _lab = LabSnapshotSource.Of(import.Records!.Compose()!, Path.Combine(_records.Directory, "lab-in-force.json")).Source!;
        _lab.Changed += (_, _) => _changed++;
        _host = await ApiHost.StartAsync(change: services =>
        {
            services.AddSingleton(_records.LabRecords);
            services.AddSingleton<ILabSnapshotSource>(_lab);
            services.AddSingleton<ILabInForce>(_lab);
            services.AddSingleton<ICallers>(new FixedCaller("lee", Role.QualityManager));
        });
    }

    public async ValueTask DisposeAsync()
    {
        await _host.DisposeAsync();
        await _records.DisposeAsync();
    }

    [Fact]
    public async Task A_new_limit_is_on_record_in_force_at_once_and_kept_for_a_start_without_a_database()
    {
        Answer answer = await PostAsync("limits", Limit);
        Assert.Equal(HttpStatusCode.Created, answer.Status);
        Assert.Equal(("fir-stability@2", "lee", "Tightened after the audit"), (answer.Member("reference"), answer.Member("author"), answer.Member("reason")));
        Assert.True(answer.Json.GetProperty("inForce").GetBoolean());
        Assert.Equal(1, _changed);
        Assert.Equal(15, _lab.Current.LimitInForce(new SourceKey("sample", "fir"), "stability", 30, null, _host.Now)!.Maximum);
        Assert.Contains("\"maximum\": 15", await File.ReadAllTextAsync(Path.Combine(_records.Directory, "lab-in-force.json"), TestContext.Current.CancellationToken), StringComparison.Ordinal);
    }

    [Fact]
    public async Task All_revisions_are_listed_with_author_reason_and_date_newest_first()
    {
        await PostAsync("limits", Limit);
        JsonElement[] items = [.. (await _host.GetAsync("/api/v1/limits?source=sample.fir&criterion=stability")).Json.GetProperty("items").EnumerateArray()];
        Assert.Equal(["fir-stability@2 lee True", "fir-stability@1 os/kim False"], items.Select(item => $"{item.GetProperty("reference")} {item.GetProperty("author")} {item.GetProperty("inForce")}"));
        Assert.Equal(20, items[1].GetProperty("content").GetProperty("maximum").GetDouble());
        Assert.Empty((await _host.GetAsync("/api/v1/limits?criterion=purge")).Json.GetProperty("items").EnumerateArray());
        Assert.Equal(HttpStatusCode.BadRequest, (await _host.GetAsync("/api/v1/limits?criterion=colour")).Status);

        Answer first = await _host.GetAsync("/api/v1/limits?count=1");
        Answer second = await _host.GetAsync("/api/v1/limits?count=1&after=" + first.Member("next"));
        Assert.Equal("fir-stability@1", second.Json.GetProperty("items")[0].GetProperty("reference").GetString());
        Assert.Equal(JsonValueKind.Null, second.Json.GetProperty("next").ValueKind);
    }

    [Fact]
    public async Task A_corrected_certificate_is_in_force_for_the_instrument()
    {
        Assert.Equal(HttpStatusCode.Created, (await PostAsync("certificates", Certificate)).Status);
        ChannelKey well = new(new SourceKey("sample", "fir"), "well-1");
        Assert.Equal("c-1@2", _lab.Current.CertificateInForce(well, _host.Now)!.Reference);
        JsonElement items = (await _host.GetAsync("/api/v1/certificates?instrument=prt-1")).Json.GetProperty("items");
        Assert.Equal(["c-1@2", "c-1@1"], items.EnumerateArray().Select(item => item.GetProperty("reference").GetString()));
        JsonElement instrument = (await _host.GetAsync("/api/v1/instruments")).Json.GetProperty("items")[0];
        Assert.Equal(("prt-1", "c-1@2"), (instrument.GetProperty("id").GetString(), instrument.GetProperty("certificateInForce").GetString()));
        Assert.Equal(2, instrument.GetProperty("revisions").GetArrayLength());
    }

    [Fact]
    public async Task A_revision_that_is_not_the_next_is_a_conflict_and_the_same_again_adds_nothing()
    {
        Assert.Equal((HttpStatusCode.Conflict, "revision-not-next"), Short(await PostAsync("limits", Limit.Replace("\"revision\": 2", "\"revision\": 3", StringComparison.Ordinal))));
        Assert.Equal((HttpStatusCode.Conflict, "revision-not-next"), Short(await PostAsync("limits", Limit.Replace("\"revision\": 2", "\"revision\": 1", StringComparison.Ordinal))));
        await PostAsync("limits", Limit);
        Assert.Equal(HttpStatusCode.OK, (await PostAsync("limits", Limit)).Status);
        Assert.Equal(1, _changed);
    }

    [Theory]
    [InlineData("""{ "reason": "x" }""", "missing")]
    [InlineData("""{ "id": "a", "id": "b", "reason": "x" }""", "not-json")]
    [InlineData("[1]", "wrong-type")]
    [InlineData("""{ "id": "a" }""", "missing")]
    [InlineData("""{ "id": "\ud800", "reason": "x" }""", "not-text")]
    [InlineData("""{ "maximum": 1e999, "reason": "x" }""", "not-text")]
    [InlineData("""{ "recorded": {}, "reason": "x" }""", "unknown-member")]
    public async Task What_is_wrong_is_refused_with_findings_and_never_an_exception(string body, string code)
    {
        foreach (string path in new[] { "limits", "certificates" })
        {
            Answer answer = await PostAsync(path, body.Replace("\"reason\"", path == "limits" ? "\"reason\"" : "\"instrument\": \"prt-1\", \"reason\"", StringComparison.Ordinal));
            Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
            Assert.Contains(code, answer.FindingCodes);
        }

        Assert.Equal(0, _changed);
    }

    [Fact]
    public async Task Findings_point_into_the_body()
    {
        Answer answer = await PostAsync("certificates", Certificate.Replace("100.05", "-1", StringComparison.Ordinal).Replace("\"dueAt\": \"2027", "\"dueAt\": \"2025", StringComparison.Ordinal));
        Assert.Equal(["/characteristic/r0Ohm", "/dueAt"], answer.Json.GetProperty("findings").EnumerateArray().Select(finding => finding.GetProperty("where").GetString()).Order());
    }

    [Fact]
    public async Task A_technician_changes_no_limit() =>
        Assert.Equal(HttpStatusCode.Forbidden, (await _host.SendAsync(HttpMethod.Post, "/api/v1/limits", Limit, ("X-Test-Caller", "kim Technician"))).Status);

    private static (HttpStatusCode Status, string Code) Short(Answer answer) => (answer.Status, Assert.Single(answer.FindingCodes));

    private Task<Answer> PostAsync(string what, string body) => _host.SendAsync(HttpMethod.Post, "/api/v1/" + what, body);
}
