using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.LabFile;

/// <summary>
/// The member <c>recorded</c> of a document in force: what the records know and a lab file does not say (revisions and dates of sources,
/// what was withdrawn). An import passes over it.
/// </summary>
internal sealed class RecordedSection
{
    public const string Member = "recorded";

    private readonly Dictionary<string, (int Revision, Instant From)> _sources = new(StringComparer.Ordinal);
    private readonly Dictionary<(string Kind, string Id), Instant> _withdrawn = [];

    private RecordedSection()
    {
    }

    /// <summary>What it was put together from; null where the file has no such member.</summary>
    public LabRecorded? Recorded { get; private init; }

    /// <summary>Earlier revisions of sources.</summary>
    public IReadOnlyList<Placed<ReferenceSource>> FormerSources { get; private init; } = [];

    public static RecordedSection Read(JsonCursor top, string site)
    {
        if (top.Object(Member, required: false) is not { } item)
        {
            return new RecordedSection();
        }

        item.OnlyMembers("sequence", "importDigest", "sources", "formerSources", "withdrawn");
        RecordedSection section = new()
        {
            Recorded = new LabRecorded(item.PositiveInteger("sequence"), item.OptionalText("importDigest")),
            FormerSources = [.. item.Items("formerSources", required: false).SelectMany(former => Former(former, site))],
        };
        foreach (JsonCursor source in item.Items("sources", required: false))
        {
            source.OnlyMembers("id", "revision", "effectiveFrom");
            section._sources[source.Id("id")] = (source.PositiveInteger("revision"), source.Time("effectiveFrom"));
        }

        foreach (JsonCursor withdrawn in item.Items("withdrawn", required: false))
        {
            withdrawn.OnlyMembers("kind", "id", "from");
            section._withdrawn[(withdrawn.Text("kind"), withdrawn.Text("id"))] = withdrawn.Time("from");
        }

        return section;
    }

    public ReferenceSource Apply(ReferenceSource source) => _sources.TryGetValue(source.Key.Source, out (int Revision, Instant From) known)
        ? source with { Revision = known.Revision, EffectiveFrom = known.From }
        : source;

    public Instrument Apply(Instrument instrument) => instrument with { WithdrawnFrom = From(LabRecordKind.Instrument, instrument.Id) };

    public Certificate Apply(Certificate certificate) => certificate with { WithdrawnFrom = From(LabRecordKind.Certificate, certificate.Id) };

    public TriplePointCheck Apply(TriplePointCheck check) => check with { WithdrawnFrom = From(LabRecordKind.TriplePointCheck, check.Id) };

    public AcceptanceLimit Apply(AcceptanceLimit limit) => limit with { WithdrawnFrom = From(LabRecordKind.Limit, limit.Id) };

    private Instant? From(LabRecordKind kind, string id) => _withdrawn.TryGetValue((LabEntry.NameOf(kind), id), out Instant from) ? from : null;

    private static IEnumerable<Placed<ReferenceSource>> Former(JsonCursor item, string site)
    {
        item.OnlyMembers("revision", "effectiveFrom", "description");
        (int revision, Instant from) = (item.PositiveInteger("revision"), item.Time("effectiveFrom"));
        return item.Object("description") is { } description
            ? [new(SourceSection.Read(description, site) with { Revision = revision, EffectiveFrom = from }, description.Pointer)]
            : [];
    }
}
