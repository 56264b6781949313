using System.Text.RegularExpressions;

namespace LabWatch.Lab.Identity;

/// <summary>The form of every id that people choose: 1 to 63 characters, small letters, digits and hyphens, not starting with a hyphen. Never reused.</summary>
public static partial class Slug
{
    /// <summary>Whether a text has the form of an id.</summary>
    public static bool IsValid(string? text) => text is not null && Pattern().IsMatch(text);

    [GeneratedRegex(@"\A[a-z0-9][a-z0-9-]{0,62}\z", RegexOptions.CultureInvariant)]
    private static partial Regex Pattern();
}
