using System.Text.Json;
using System.Text.Json.Nodes;

namespace LabWatch.Lab.LabFile;

/// <summary>Takes a lab file apart into its entries, and puts entries together to a lab file: each is the inverse of the other.</summary>
public static class LabDocument
{
    private const string InstrumentMember = "instrument";

    private static readonly JsonSerializerOptions Indented = new() { WriteIndented = true };

    private static readonly (string Member, LabRecordKind Kind)[] OfInstrument =
    [
        ("installations", LabRecordKind.Installation),
        ("certificates", LabRecordKind.Certificate),
        ("triplePointChecks", LabRecordKind.TriplePointCheck),
    ];

    /// <summary>Parses a lab file that <see cref="LabFileReader"/> has found to be JSON.</summary>
    public static JsonObject Parse(ReadOnlyMemory<byte> utf8)
    {
        ReadOnlySpan<byte> text = utf8.Span.StartsWith("\uFEFF"u8) ? utf8.Span[3..] : utf8.Span;
        return JsonNode.Parse(text, documentOptions: LabFileReader.JsonOptions)!.AsObject();
    }

    /// <summary>The text of a lab file, UTF-8, indented for people.</summary>
    public static byte[] Write(JsonObject document) => JsonSerializer.SerializeToUtf8Bytes(document, Indented);

    /// <summary>The entries of a valid lab file, in the order of the file.</summary>
    public static IReadOnlyList<LabEntry> Split(JsonObject document)
    {
        ArgumentNullException.ThrowIfNull(document);
        List<LabEntry> entries = [LabEntry.Of(LabRecordKind.Site, Copy(document["site"])) with { Where = "/site" }, .. Entries(document, "sources", LabRecordKind.Source)];
        foreach (LabEntry item in Entries(document, "instruments", LabRecordKind.Instrument))
        {
            JsonObject instrument = item.Content;
            List<LabEntry> own = [];
            foreach ((string member, LabRecordKind kind) in OfInstrument)
            {
                own.AddRange(Items(instrument, member).Select((child, index) =>
                    LabEntry.Of(kind, Owned(item.Id, child)) with { Where = FormattableString.Invariant($"{item.Where}/{member}/{index}") }));
                instrument.Remove(member);
            }

            entries.Add(item);
            entries.AddRange(own);
        }

        return [.. entries, .. Entries(document, "limits", LabRecordKind.Limit), .. Entries(document, "notifiers", LabRecordKind.Notifier)];
    }

    /// <summary>The lab file that holds some entries, in their order. What belongs to an instrument that is not among them is left out.</summary>
    /// <param name="entries">The entries.</param>
    /// <param name="recorded">The member <c>recorded</c>; null for none.</param>
    public static JsonObject Join(IEnumerable<LabEntry> entries, JsonObject? recorded = null)
    {
        ILookup<LabRecordKind, LabEntry> byKind = entries.ToLookup(entry => entry.Kind);
        JsonObject document = new() { ["format"] = LabFileReader.Format };
        if (byKind[LabRecordKind.Site].LastOrDefault() is { } site)
        {
            document["site"] = site.Content.DeepClone();
        }

        document["sources"] = Array(byKind[LabRecordKind.Source].Select(entry => entry.Content.DeepClone()));
        document["instruments"] = Array(byKind[LabRecordKind.Instrument].Select(entry => Whole(entry, byKind)));
        document["limits"] = Array(byKind[LabRecordKind.Limit].Select(entry => entry.Content.DeepClone()));
        document["notifiers"] = Array(byKind[LabRecordKind.Notifier].Select(entry => entry.Content.DeepClone()));
        if (recorded is not null)
        {
            document[RecordedSection.Member] = recorded;
        }

        return document;
    }

    private static IReadOnlyList<LabEntry> Entries(JsonObject document, string member, LabRecordKind kind) =>
        [.. Items(document, member).Select((item, index) => LabEntry.Of(kind, Copy(item)) with { Where = FormattableString.Invariant($"/{member}/{index}") })];

    private static JsonObject Whole(LabEntry instrument, ILookup<LabRecordKind, LabEntry> byKind)
    {
        JsonObject whole = Copy(instrument.Content);
        foreach ((string member, LabRecordKind kind) in OfInstrument)
        {
            whole[member] = Array(byKind[kind]
                .Where(entry => string.Equals(entry.Content[InstrumentMember]!.GetValue<string>(), instrument.Id, StringComparison.Ordinal))
                .Select(entry =>
                {
                    JsonObject child = Copy(entry.Content);
                    child.Remove(InstrumentMember);
                    return child;
                }));
        }

        return whole;
    }

    private static JsonObject Owned(string instrument, JsonObject child)
    {
        JsonObject owned = new() { [InstrumentMember] = instrument };
        foreach ((string name, JsonNode? value) in child)
        {
            owned[name] = value?.DeepClone();
        }

        return owned;
    }

    private static IEnumerable<JsonObject> Items(JsonObject parent, string member) => parent[member] is JsonArray items ? items.OfType<JsonObject>() : [];

    private static JsonObject Copy(JsonNode? node) => node!.DeepClone().AsObject();

    private static JsonArray Array(IEnumerable<JsonNode> items) => new([.. items]);
}
