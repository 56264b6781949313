using System.Text.Json.Serialization;

namespace LabWatch.Lab.Identity;

/// <summary>What names a reference source everywhere: its site and its id in that site, written <c>site.source</c>.</summary>
/// <param name="Site">Id of the site (a slug).</param>
/// <param name="Source">Id of the source in the site (a slug).</param>
[JsonConverter(typeof(SourceKeyJsonConverter))]
public readonly record struct SourceKey(string Site, string Source)
{
    /// <summary>Reads <c>site.source</c>; false where either part is not a slug.</summary>
    public static bool TryParse(string? text, out SourceKey key)
    {
        int dot = text?.IndexOf('.', StringComparison.Ordinal) ?? -1;
        key = dot > 0 ? new SourceKey(text![..dot], text[(dot + 1)..]) : default;
        return dot > 0 && Slug.IsValid(key.Site) && Slug.IsValid(key.Source);
    }

    /// <summary>The key as <c>site.source</c>.</summary>
    public override string ToString() => $"{Site}.{Source}";
}
