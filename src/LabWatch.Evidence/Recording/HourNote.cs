using System.Globalization;
using System.Text.Json.Nodes;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records.Audit;

namespace LabWatch.Evidence.Recording;

/// <summary>The entry of a sealed part of a source-hour. Its record digest is that of the sealed bytes.</summary>
internal static class HourNote
{
    /// <summary>What the subjects of sealed parts begin with.</summary>
    public const string Prefix = "hour/";

    /// <summary>Subject of a part.</summary>
    public static string Subject(SourceKey source, Instant hour, int part) =>
        string.Create(CultureInfo.InvariantCulture, $"{Prefix}{source.Source}/{hour}/{part}");

    /// <summary>The entry of a part.</summary>
    public static AuditNote Of(SealedHour part) => new(
        part.Source.Site,
        part.SealedAt,
        AuditActor.Service,
        AuditActions.HourSealed,
        Subject(part.Source, part.Hour, part.Part),
        new JsonObject
        {
            ["source"] = part.Source.Source,
            ["hour"] = part.Hour.ToString(),
            ["part"] = part.Part,
            ["readings"] = part.Readings,
            ["seal"] = part.Seal,
            ["lastChange"] = part.LastChange,
            ["sealedAt"] = part.SealedAt.ToString(),
        },
        Convert.ToHexStringLower(part.Digest.Span));
}
