using System.Text;
using LabWatch.Intake.Import;
using LabWatch.Intake.Options;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Intake;

/// <summary>Readings of the past from delimited text.</summary>
public sealed class ImportTests : IDisposable
{
    private readonly TemporaryDirectory _directory = new();
    private readonly FakeStore _store = new();
    private readonly FakeQuarantine _quarantine = new();
    private readonly FakeTimeProvider _clock = new(DecodingBench.Arrival.ToDateTimeOffset());
    private readonly List<RefusedRow> _refused = [];

    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    public void Dispose() => _directory.Dispose();

    // RFC 4180 section 2, rules 1 to 7.
    [Theory]
    [InlineData("aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n", "aaa|bbb|ccc", "zzz|yyy|xxx")]
    [InlineData("aaa,bbb,ccc\r\nzzz,yyy,xxx", "aaa|bbb|ccc", "zzz|yyy|xxx")]
    [InlineData("\"aaa\",\"bbb\",\"ccc\"\r\nzzz,yyy,xxx", "aaa|bbb|ccc", "zzz|yyy|xxx")]
    [InlineData("\"aaa\",\"b\r\nbb\",\"ccc\"\r\nzzz,yyy,xxx", "aaa|b\r\nbb|ccc", "zzz|yyy|xxx")]
    [InlineData("\"aaa\",\"b\"\"bb\",\"ccc\"\n\nzzz,,", "aaa|b\"bb|ccc", "zzz||")]
    public void Rows_are_those_of_rfc_4180(string text, params string[] rows)
    {
        CsvReader reader = new(new StringReader(text), ',');
        List<string> read = [];
        while (reader.Read() is { } fields)
        {
            read.Add(string.Join('|', fields));
        }

        Assert.Equal(rows, read);
    }

    [Fact]
    public void Lines_are_counted_through_quoted_fields_and_broken_rows()
    {
        CsvReader reader = new(new StringReader("a,b\n\"x\ny\",1\n\"p\"q,2\nr,3\n"), ',');
        Assert.NotNull(reader.Read());
        Assert.NotNull(reader.Read());
        Assert.Equal(2, reader.Line);
        Assert.Throws<InvalidDataException>(reader.Read);
        Assert.Equal(4, reader.Line);
        Assert.NotNull(reader.Read());
        Assert.Equal(5, reader.Line);
    }

    [Fact]
    public async Task A_wide_file_becomes_readings_in_the_channels_units()
    {
        ImportTotals totals = await ImportAsync("Zeit;T1;Leistung\n01.06.2026 12:00:00;107,7935;0,0552\n01.06.2026 12:00:01;;0,0553\n", new ImportOrder
        {
            TimeColumn = "Zeit",
            TimeFormat = "dd.MM.yyyy HH:mm:ss",
            TimeZone = "Europe/Berlin",
            Columns = ["T1=fir/well-1", "Leistung=hollin-vale.fir/power:kW"],
            Delimiter = ';',
            DecimalComma = true,
        });
        Assert.Empty(_refused);
        Assert.Equal((3L, 3L), (totals.Readings, totals.Stored!.Value));
        Assert.Equal([107.7935, 55.2, 55.3], _store.Values);
    }

    [Fact]
    public async Task A_long_file_names_channel_and_unit_in_each_row()
    {
        await ImportAsync(
            "at,channel,value,unit\n2026-06-01T12:00:00Z,well-1,107.7935,\n2026-06-01 14:00:00+02:00,shell,300.15,K\n",
            new ImportOrder { TimeColumn = "at", ChannelColumn = "channel", UnitColumn = "unit", Source = "fir" });
        Assert.Empty(_refused);
        Assert.Equal([107.7935, 27], _store.Values);
    }

    // Clocks in Ireland went back at 01:00 UTC on 25 October 2026 and forward at 01:00 UTC on 29 March 2026 (IANA time zone database, rule EU).
    [Theory]
    [InlineData("2026-10-25 01:30:00", "time-ambiguous")]
    [InlineData("2026-03-29 01:30:00", "time-does-not-exist")]
    [InlineData("2026-10-25 01:30:00+01:00", null)]
    [InlineData("2026-10-25 02:30:00", null)]
    [InlineData("2026-10-25 25:30:00", "not-a-time")]
    [InlineData("yesterday", "not-a-time")]
    public async Task Local_times_that_are_not_one_instant_are_refused_with_their_line(string time, string? code)
    {
        await ImportAsync($"time,well-1\n2026-05-01 12:00:00,1\n{time},2\n", new ImportOrder { TimeColumn = "time", Source = "fir", TimeZone = "Europe/Dublin" });
        Assert.Equal(code is null ? [] : [(3L, code, "line 3")], _refused.Select(row => (row.Line, row.Findings[0].Code, row.Findings[0].Where)));
        Assert.Equal(code is null ? 2 : 1, _store.Values.Count);
    }

    // Lord Howe Island shifts by half an hour: 01:30 to 02:00 happens twice on 5 April 2026 (IANA time zone database).
    [Theory]
    [InlineData("Australia/Lord_Howe", "2026-04-05 01:45:00", "time-ambiguous")]
    [InlineData("Australia/Lord_Howe", "2026-04-05 02:15:00", null)]
    [InlineData("+05:30", "2026-04-05 01:45:00", null)]
    [InlineData(null, "2026-04-05 01:45:00", "time-zone-needed")]
    public void Zones_are_taken_as_they_are(string? zone, string text, string? code)
    {
        (ImportTimes? times, _) = ImportTimes.Create("iso", zone);
        Assert.Equal(code, times!.Read(text, out Instant time));
        if (zone == "+05:30")
        {
            Assert.Equal("2026-04-04T20:15:00Z", time.ToString());
        }
    }

    [Fact]
    public async Task Bad_rows_go_to_quarantine_with_their_lines_and_the_others_are_stored()
    {
        ImportTotals totals = await ImportAsync(
            "time,well-1,shell\n2026-06-01T12:00:00Z,1,2\n2026-06-01T12:00:01Z,x,3\n2026-06-01T12:00:02Z,4\n2027-06-01T12:00:02Z,5,6\n",
            new ImportOrder { TimeColumn = "time", Source = "fir" });
        Assert.Equal([3L, 4, 5], _refused.Select(row => row.Line));
        Assert.Equal(["import/file.csv/line-3", "import/file.csv/line-4", "import/file.csv/line-5"], _quarantine.Messages.Select(message => message.Topic));
        Assert.Equal("2026-06-01T12:00:01Z,x,3", Encoding.UTF8.GetString(_quarantine.Messages[0].Payload.Span));
        Assert.Equal([1, 2, 3], _store.Values);
        Assert.Equal(3, totals.Refused);
    }

    [Fact]
    public async Task A_second_import_of_the_same_file_changes_nothing()
    {
        const string Text = "time,well-1\n2026-06-01T12:00:00Z,1\n2026-06-01T12:00:01Z,2\n";
        ImportOrder order = new() { TimeColumn = "time", Source = "fir" };
        Assert.Equal(2, (await ImportAsync(Text, order)).Stored);
        ImportTotals again = await ImportAsync(Text, order);
        Assert.Equal((0L, 2L), (again.Stored!.Value, again.Duplicates!.Value));
    }

    [Fact]
    public async Task An_import_that_was_cut_off_goes_on_where_it_was()
    {
        var text = new StringBuilder("time,well-1\n");
        for (int i = 0; i < 50_000; i++)
        {
            text.Append(System.Globalization.CultureInfo.InvariantCulture, $"{1_780_000_000 + i},{i}\n");
        }

        ImportOrder order = new() { TimeColumn = "time", TimeFormat = "unix", Source = "fir" };
        using CancellationTokenSource cut = new();
        await Assert.ThrowsAnyAsync<OperationCanceledException>(() => RunAsync(text.ToString(), order, (_, _) => cut.Cancel(), cut.Token));
        Assert.Equal(20_000, _store.Values.Count);
        ImportResult result = await RunAsync(text.ToString(), order, (_, _) => { }, Stop);
        Assert.Equal(20_001, result.FromLine);
        Assert.Equal((30_000L, 0L), (result.Totals!.Stored!.Value, result.Totals.Duplicates!.Value));
        Assert.Empty(Directory.GetFiles(Path.Combine(_directory.Path, "marks")));
    }

    [Fact]
    public async Task A_header_that_does_not_fit_is_found_before_anything_is_read()
    {
        ImportResult result = await RunAsync("time,a\n1,2\n", new ImportOrder { TimeColumn = "at", TimeZone = "Nowhere/Land", Columns = ["a=fir/none", "b=fir/well-1"] }, (_, _) => { }, Stop);
        Assert.Null(result.Totals);
        Assert.Equal(["unknown-column", "unknown-channel", "unknown-column", "unknown-time-zone"], result.Findings.Select(finding => finding.Code));
    }

    private async Task<ImportTotals> ImportAsync(string text, ImportOrder order) =>
        (await RunAsync(text, order, (_, refused) => _refused.AddRange(refused), Stop)).Totals!;

    private async Task<ImportResult> RunAsync(string text, ImportOrder order, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken)
    {
        string file = Path.Combine(_directory.Path, "file.csv");
        await File.WriteAllTextAsync(file, text, Stop);
        ReadingImporter importer = new(new IntakeLab(), new IntakeOptions { InstallationId = "one", SpoolDirectory = _directory.Path }, _clock);
        return await importer.IntoStoreAsync(file, order, _store, _quarantine, Path.Combine(_directory.Path, "marks"), report, cancellationToken);
    }
}
