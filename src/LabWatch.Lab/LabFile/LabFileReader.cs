using System.Text.Json;
using System.Text.Unicode;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Lab.LabFile;

/// <summary>
/// Reads a lab file: JSON (RFC 8259) with comments and trailing commas allowed, in the shape of <c>lab-file.schema.json</c>.
/// One pass lists all findings.
/// </summary>
public static class LabFileReader
{
    /// <summary>Value of the member <c>format</c> that this reader understands.</summary>
    public const string Format = "labwatch-lab/1";

    /// <summary>Largest lab file, bytes.</summary>
    public const int MaximumLength = 16 * 1024 * 1024;

    /// <summary>How the text is read: comments and trailing commas are allowed, a member given twice is not.</summary>
    internal static readonly JsonDocumentOptions JsonOptions =
        new() { CommentHandling = JsonCommentHandling.Skip, AllowTrailingCommas = true, AllowDuplicateProperties = false, MaxDepth = 32 };

    /// <summary>The published JSON Schema of the lab file.</summary>
    public static string Schema
    {
        get
        {
            using Stream stream = typeof(LabFileReader).Assembly.GetManifestResourceStream("LabWatch.Lab.lab-file.schema.json")!;
            using StreamReader reader = new(stream);
            return reader.ReadToEnd();
        }
    }

    /// <summary>Reads and validates a lab file from UTF-8 bytes (a byte order mark is skipped).</summary>
    public static LabFileResult Read(ReadOnlyMemory<byte> utf8)
    {
        if (utf8.Length > MaximumLength)
        {
            return new LabFileResult(null, [new Finding("too-large", string.Empty, "The lab file is larger than 16 MiB.", null, "Check that it is the right file.")]);
        }

        ReadOnlyMemory<byte> text = utf8.Span.StartsWith("\uFEFF"u8) ? utf8[3..] : utf8;
        if (!Utf8.IsValid(text.Span))
        {
            return new LabFileResult(null, [new Finding("not-utf8", string.Empty, "The file is not UTF-8 text.", null, "Save it as UTF-8.")]);
        }

        try
        {
            using JsonDocument document = JsonDocument.Parse(text, JsonOptions);
            return Read(document.RootElement);
        }
        catch (InvalidOperationException)
        {
            // An escape such as \ud800 alone is JSON by its grammar, but no text.
            return new LabFileResult(null, [new Finding("not-text", string.Empty, "A \\u escape in the file is half of a surrogate pair.", null, "Correct the escape.")]);
        }
        catch (JsonException exception)
        {
            string where = FormattableString.Invariant($"line {exception.LineNumber + 1}, byte {exception.BytePositionInLine + 1}");
            return new LabFileResult(null, [new Finding("not-json", where, "This is not JSON: " + exception.Message, null, "Correct the text at that place; comments and trailing commas are allowed.")]);
        }
    }

    private static LabFileResult Read(JsonElement root)
    {
        List<Finding> findings = [];
        JsonCursor top = new(root, string.Empty, findings);
        if (root.ValueKind != JsonValueKind.Object)
        {
            top.Report("wrong-type", "A lab file is one object.", "Start the file with an opening brace.");
            return new LabFileResult(null, findings);
        }

        top.OnlyMembers("$schema", "format", "site", "sources", "instruments", "limits", "notifiers", RecordedSection.Member);
        if (!string.Equals(top.Text("format"), Format, StringComparison.Ordinal))
        {
            top.Report("unknown-format", "This format of lab file is not known.", $"Write \"{Format}\", or use the program that wrote the file.", "format");
        }

        LabSite site = SiteSection.Read(top);
        IReadOnlyList<ReferenceSource> sources = [.. top.Items("sources").Select(item => SourceSection.Read(item, site.Id))];
        InstrumentSection.Instruments instruments = InstrumentSection.Read(top, site.Id);
        IReadOnlyList<AcceptanceLimit> limits = [.. top.Items("limits", required: false).Select(item => LimitSection.Read(item, site.Id))];
        IReadOnlyList<Notifier> notifiers = [.. top.Items("notifiers", required: false).Select(NotifierSection.Read)];

        RecordedSection recorded = RecordedSection.Read(top, site.Id);

        LabFileChecks.Run(sources, recorded.FormerSources, instruments, limits, notifiers, findings);
        LabSnapshot? snapshot = findings.Count > 0
            ? null
            : new LabSnapshot(
                site,
                [.. sources.Select(recorded.Apply)],
                [.. instruments.All.Select(recorded.Apply)],
                [.. instruments.Installations.Select(stay => stay.Value)],
                [.. instruments.Certificates.Select(certificate => recorded.Apply(certificate.Value))],
                [.. limits.Select(recorded.Apply)],
                notifiers)
            {
                FormerSources = [.. recorded.FormerSources.Select(source => source.Value)],
                TriplePointChecks = [.. instruments.TriplePointChecks.Select(recorded.Apply)],
            };
        return new LabFileResult(snapshot, findings) { Recorded = recorded.Recorded };
    }
}
