using System.Globalization;
using System.Text.Json.Nodes;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.LabFile;

/// <summary>
/// One entry of a lab file as a record of its own, in the file's own form. What stands inside an instrument in the file (stays,
/// certificates, triple-point checks) names it by the member <c>instrument</c> here.
/// </summary>
/// <param name="Kind">What it is.</param>
/// <param name="Id">Id at the site; of a stay the instrument, the channel and the first instant, which no other stay shares.</param>
/// <param name="Revision">The revision that the entry carries; null for kinds that carry none.</param>
/// <param name="Content">The entry.</param>
public sealed record LabEntry(LabRecordKind Kind, string Id, int? Revision, JsonObject Content)
{
    /// <summary>JSON Pointer of where the entry stood in the file it was taken from; empty where it was not taken from one.</summary>
    public string Where { get; init; } = string.Empty;

    /// <summary>Whether entries of a kind carry their revision themselves, so that provenance can name them by <c>id@revision</c>.</summary>
    public static bool CarriesRevision(LabRecordKind kind) =>
        kind is LabRecordKind.Certificate or LabRecordKind.TriplePointCheck or LabRecordKind.Limit;

    /// <summary>How a kind is written, for example <c>triple-point-check</c>.</summary>
    public static string NameOf(LabRecordKind kind) => JsonCursor.ChoiceName(kind);

    /// <summary>The kind of a name.</summary>
    /// <exception cref="InvalidDataException">No kind has that name.</exception>
    public static LabRecordKind KindOf(string name)
    {
        foreach (LabRecordKind kind in Enum.GetValues<LabRecordKind>())
        {
            if (string.Equals(NameOf(kind), name, StringComparison.Ordinal))
            {
                return kind;
            }
        }

        throw new InvalidDataException($"There is no kind of record '{name}'.");
    }

    /// <summary>The entry of a kind whose content names it. The content must have passed <see cref="LabFileReader"/>.</summary>
    public static LabEntry Of(LabRecordKind kind, JsonObject content)
    {
        ArgumentNullException.ThrowIfNull(content);
        return new LabEntry(
            kind,
            kind == LabRecordKind.Installation ? StayId(content) : Text(content, "id"),
            CarriesRevision(kind) ? (int)double.Parse(content["revision"]!.ToJsonString(), CultureInfo.InvariantCulture) : null,
            content);
    }

    private static string StayId(JsonObject stay) =>
        Instant.TryParse(Text(stay, "from"), out Instant from)
            ? $"{Text(stay, "instrument")}/{Text(stay, "source")}/{Text(stay, "channel")}/{from}"
            : throw new ArgumentException("The stay has not been validated.", nameof(stay));

    private static string Text(JsonObject content, string name) => content[name]!.GetValue<string>();
}
