using System.Diagnostics;
using LabWatch.Evidence.Verification;
using LabWatch.Lab.Findings;
using LabWatch.Records;
using LabWatch.Records.Audit.Verification;

namespace LabWatch.SystemTests.Evidence;

/// <summary>
/// Changes of the database files by somebody who has them: every change of what the trail vouches for is found, and said where. The seeds
/// are fixed; which changes changed content is told by comparing the content before and after, apart from the verification.
/// </summary>
public sealed class TamperingTrialTests : IAsyncLifetime, IDisposable
{
    private const int FlipsInAll = 500;
    private const int ChangesInAll = 500;

    private static readonly string[] Files = ["records.db", "readings.db", "trail-head.json"];

    private readonly TemporaryDirectory _original = new();
    private readonly TemporaryDirectory _copy = new();

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => await TrialData.MakeAsync(_original.Path, Token);

    public ValueTask DisposeAsync()
    {
        Dispose();
        return ValueTask.CompletedTask;
    }

    public void Dispose()
    {
        _original.Dispose();
        _copy.Dispose();
    }

    [Fact]
    public void What_nobody_changed_is_clean()
    {
        (VerifyReport report, _) = Verify(_original.Path);
        Assert.Empty(report.Findings.Kept);
        Assert.Equal(0, report.Findings.Total);
        Assert.All(["assessments", "alerts", "alert_transitions", "lab_imports", "revisions", "audit_entries", "block"], table => Assert.True(report.Examined[table] > 0, table));
        Assert.DoesNotContain(report.Notes, note => note.Contains("newer than the trail", StringComparison.Ordinal));
        Assert.Empty(Directory.GetFiles(_original.Path, "*-wal"));
    }

    [Fact]
    public void Every_change_by_a_database_tool_is_found_and_located()
    {
        TrialDump before = TrialDump.Of(_original.Path);
        List<string> missed = [];
        int changed = 0;
        int vain = 0;
        Stopwatch watch = Stopwatch.StartNew();
        for (int seed = 0; changed < TestLength.Of(150, ChangesInAll); seed++)
        {
            Copy();
            string what = new TrialChanges(new Random(seed)).Make(_copy.Path);
            IReadOnlyList<(TrialTable Table, string? Lost, string? Got)> differences = before.Differences(TrialDump.Of(_copy.Path));
            if (differences.Count == 0)
            {
                vain++;
                continue;
            }

            changed++;
            Judge(what, differences, missed);
        }

        Tell($"changes of content by SQL: {changed} (and {vain} that changed nothing), not found or not located: {missed.Count}, {watch.Elapsed.TotalSeconds / changed * 1000:F0} ms a trial");
        Assert.True(missed.Count == 0, string.Join('\n', missed));
    }

    [Fact]
    public void Every_flipped_bit_that_changes_content_is_found_and_located()
    {
        TrialDump before = TrialDump.Of(_original.Path);
        List<string> missed = [];
        int changed = 0;
        int unchanged = 0;
        int unreadable = 0;
        int cautious = 0;
        Stopwatch watch = Stopwatch.StartNew();
        for (int seed = 0; changed + unreadable < TestLength.Of(150, FlipsInAll); seed++)
        {
            Copy();
            string what = Flip(new Random(seed));
            TrialDump after = TrialDump.Of(_copy.Path);
            IReadOnlyList<(TrialTable Table, string? Lost, string? Got)> differences = before.Differences(after);
            if (after.Unreadable is not null)
            {
                unreadable++;
                if (Verify(_copy.Path) is ({ IsClean: true }, { Count: 0 }))
                {
                    missed.Add($"{what}: {after.Unreadable}");
                }
            }
            else if (differences.Count == 0)
            {
                unchanged++;
                cautious += Verify(_copy.Path) is ({ IsClean: true }, { Count: 0 }) ? 0 : 1;
            }
            else
            {
                changed++;
                Judge(what, differences, missed);
            }
        }

        Tell($"flipped bits: {changed} changed content, {unreadable} made a table unreadable, not found or not located: {missed.Count}; {unchanged} changed no content ({cautious} of them reported all the same), {watch.Elapsed.TotalSeconds / (changed + unreadable + unchanged) * 1000:F0} ms a trial");
        Assert.True(missed.Count == 0, string.Join('\n', missed));
    }

    /// <summary>Each row that differs must be named, by what it is called before or after the change; what lies in entries may show at the noted end.</summary>
    private void Judge(string what, IReadOnlyList<(TrialTable Table, string? Lost, string? Got)> differences, List<string> missed)
    {
        (VerifyReport report, IReadOnlyList<Finding> unfit) = Verify(_copy.Path);
        if (report is null)
        {
            missed.AddRange(unfit.Count > 0 ? [] : [what]);
            return;
        }

        foreach (IGrouping<TrialTable, (TrialTable Table, string? Lost, string? Got)> changed in differences.GroupBy(one => one.Table))
        {
            string[] lost = [.. changed.Select(one => one.Lost).OfType<string>()];
            string[] got = [.. changed.Select(one => one.Got).OfType<string>()];
            bool isOneRow = lost.Length == 1 && got.Length == 1 && IsNamed(report, changed.Key, got[0]);
            // Every lost row must be named; what came in its place is told with it. Rows that came alone must be named themselves.
            string? silent = isOneRow ? null : (lost.Length > 0 ? lost : got).FirstOrDefault(id => !IsNamed(report, changed.Key, id));
            if (silent is not null)
            {
                missed.Add($"{what}: {changed.Key.Name} {silent}; found: {string.Join("; ", report.Findings.Kept.Take(4).Select(finding => finding.Code + " " + finding.Where))}");
                return;
            }
        }
    }

    private static bool IsNamed(VerifyReport report, TrialTable table, string id) =>
        (table.Name == "audit_entries" && report.Findings.Counts.ContainsKey(TrailCodes.HeadDiffers))
        || report.Findings.Kept.Any(finding => (IsTable(finding, table) && Names(finding, id)) || IsBesideMissing(finding, table));

    private static bool IsTable(TrailFinding finding, TrialTable table) => finding.Table == table.Name || (table.Name == "source" && finding.Field == "source_id");

    private static bool Names(TrailFinding finding, string id) => finding.Id.EndsWith(id, StringComparison.Ordinal);

    /// <summary>A missing entry is named by the one behind it, a source that is gone or has another number by the parts that it leaves without a source.</summary>
    private static bool IsBesideMissing(TrailFinding finding, TrialTable table) =>
        (table.Name == "audit_entries" && finding.Code is TrailCodes.EntriesMissing or TrailCodes.LinkBroken)
        || (table.Name == "source" && finding.Field == "source_id");

    private string Flip(Random random)
    {
        string file = Path.Combine(_copy.Path, Files[random.Next(2)]);
        byte[] bytes = File.ReadAllBytes(file);
        int place = random.Next(bytes.Length);
        int bit = random.Next(8);
        bytes[place] ^= (byte)(1 << bit);
        File.WriteAllBytes(file, bytes);
        return $"{Path.GetFileName(file)} byte {place} bit {bit}";
    }

    private void Copy()
    {
        foreach (string file in Directory.GetFiles(_copy.Path))
        {
            File.Delete(file);
        }

        foreach (string file in Files)
        {
            File.Copy(_original.At(file), _copy.At(file));
        }
    }

    private static (VerifyReport Report, IReadOnlyList<Finding> Unfit) Verify(string directory)
    {
        (VerifyReport? report, IReadOnlyList<Finding> unfit) = DataVerifier.Run(new VerifyRequest(directory, RecordsOptions.InDirectory(directory), []));
        return (report!, unfit);
    }

    private static void Tell(string line)
    {
        TestContext.Current.TestOutputHelper?.WriteLine(line);
        TestContext.Current.SendDiagnosticMessage(line);
    }
}
