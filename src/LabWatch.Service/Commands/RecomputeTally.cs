using System.CommandLine;
using System.Text.Json;
using LabWatch.Assessments.Recomputation;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Commands;

/// <summary>Counts what a recomputation finds, shows how far it has come, and reports.</summary>
internal sealed class RecomputeTally(InvocationConfiguration console, ProgressLine progress)
{
    /// <summary>Items that are printed one by one.</summary>
    private const int Shown = 50;

    private static readonly JsonSerializerOptions Options = new(JsonSerializerDefaults.Web) { WriteIndented = true };

    private readonly long _start = TimeProvider.System.GetTimestamp();
    private readonly SortedDictionary<string, long[]> _criteria = new(StringComparer.Ordinal);
    private readonly List<RecomputedAssessment> _others = [];
    private long _count;

    /// <summary>Takes one assessment into account.</summary>
    public void Take(RecomputedAssessment item)
    {
        if (!_criteria.TryGetValue(item.Standing.Criterion, out long[]? counts))
        {
            _criteria[item.Standing.Criterion] = counts = new long[Enum.GetValues<Agreement>().Length];
        }

        counts[(int)item.Agreement]++;
        _count++;
        if (item.Agreement is not Agreement.Identical)
        {
            _others.Add(item);
        }

        progress.Report($"{item.Standing.Source} {item.Standing.Criterion}, assessments in all", _count);
    }

    /// <summary>Prints the result. Exit code 0 where everything is identical, agrees or was superseded; else 3.</summary>
    public int Finish(FileInfo? json)
    {
        TimeSpan took = TimeProvider.System.GetElapsedTime(_start);
        progress.Dispose();
        TextWriter output = console.Output;
        foreach (RecomputedAssessment item in _others.Take(Shown))
        {
            output.WriteLine($"{item.Standing.Source} {item.Standing.Criterion} {item.Standing.Scope}".TrimEnd() + $", window ending {item.Standing.Window.End}, revision {FormattableString.Invariant($"{item.Standing.Revision}")}");
            output.WriteLine($"    {Word(item.Agreement)}: {Finding.Quote(item.Difference)}" + (item.Superseding is { } fresh ? FormattableString.Invariant($" Recorded as revision {fresh.Revision}.") : string.Empty));
        }

        if (_others.Count > Shown)
        {
            output.WriteLine(FormattableString.Invariant($"... and {_others.Count - Shown} more. --json FILE lists them."));
        }

        foreach ((string criterion, long[] counts) in _criteria)
        {
            output.WriteLine($"{criterion,-22}" + string.Join(", ", Enum.GetValues<Agreement>().Where(kind => counts[(int)kind] > 0).Select(kind => FormattableString.Invariant($"{counts[(int)kind]:N0} {Word(kind)}"))));
        }

        output.WriteLine(FormattableString.Invariant($"{_count:N0} assessments computed again in {took.TotalSeconds:0.0} s ({_count / Math.Max(took.TotalSeconds, 1e-3):N0} a second)."));
        if (json is not null)
        {
            WriteJson(json);
        }

        return _others.TrueForAll(item => item.Agreement is Agreement.Agrees || item.Superseding is not null) ? ExitCode.Success : ExitCode.TamperingFound;
    }

    private void WriteJson(FileInfo json)
    {
        using FileStream stream = json.Create();
        JsonSerializer.Serialize(
            stream,
            _others.Select(item => new
            {
                id = item.Standing.Id,
                source = item.Standing.Source.ToString(),
                item.Standing.Criterion,
                item.Standing.Scope,
                windowEnd = item.Standing.Window.End.ToString(),
                item.Standing.Revision,
                outcome = Word(item.Agreement),
                item.Difference,
                supersededBy = item.Superseding?.Id,
            }),
            Options);
    }

    private static string Word(Agreement agreement) => agreement switch
    {
        Agreement.Identical => "identical",
        Agreement.Agrees => "agree",
        Agreement.Differs => "differ",
        Agreement.InputsChanged => "rest on other inputs",
        _ => "not possible",
    };
}
