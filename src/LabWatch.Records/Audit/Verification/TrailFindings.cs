namespace LabWatch.Records.Audit.Verification;

/// <summary>Collects what a verification finds: all of it is counted, a bounded part of each kind is kept. Not thread-safe.</summary>
public sealed class TrailFindings
{
    /// <summary>Findings of one code that are kept; further ones are counted only.</summary>
    public const int KeptPerCode = 1_000;

    private readonly List<TrailFinding> _kept = [];
    private readonly SortedDictionary<string, long> _counts = new(StringComparer.Ordinal);

    /// <summary>The findings kept, in the order of finding.</summary>
    public IReadOnlyList<TrailFinding> Kept => _kept;

    /// <summary>How many there were of each code.</summary>
    public IReadOnlyDictionary<string, long> Counts => _counts;

    /// <summary>How many there were in all.</summary>
    public long Total => _counts.Values.Sum();

    /// <summary>Whether a further finding of a code would be kept: what is costly to describe asks first.</summary>
    public bool Keeps(string code) => _counts.GetValueOrDefault(code) < KeptPerCode;

    /// <summary>Adds a finding.</summary>
    public void Add(TrailFinding finding)
    {
        ArgumentNullException.ThrowIfNull(finding);
        if (Keeps(finding.Code))
        {
            _kept.Add(finding);
        }

        Count(finding.Code);
    }

    /// <summary>Counts a finding that is not described.</summary>
    public void Count(string code) => _counts[code] = _counts.GetValueOrDefault(code) + 1;
}
