using LabWatch.Lab.Findings;

namespace LabWatch.Service.Api.Requests;

/// <summary>Checks texts of a request's body and collects every finding.</summary>
internal sealed class BodyChecks
{
    private readonly List<Finding> _findings = [];

    /// <summary>What is wrong, in the order met.</summary>
    public IReadOnlyList<Finding> Findings => _findings;

    /// <summary>Adds a finding about a member.</summary>
    public void Add(string code, string member, string message, string? value, string cure) =>
        _findings.Add(new Finding(code, "/" + member, message, Finding.Quote(value), cure));

    /// <summary>One line that must be there, trimmed.</summary>
    public string Line(string member, string? text, int maximum)
    {
        if (string.IsNullOrWhiteSpace(text))
        {
            Add("missing", member, $"The member {member} is missing.", text, FormattableString.Invariant($"Give 1 to {maximum} characters."));
            return string.Empty;
        }

        return OptionalLine(member, text, maximum) ?? string.Empty;
    }

    /// <summary>One line, trimmed; null where it is missing or blank.</summary>
    public string? OptionalLine(string member, string? text, int maximum)
    {
        string? trimmed = string.IsNullOrWhiteSpace(text) ? null : text.Trim();
        if (trimmed is not null && (trimmed.Length > maximum || trimmed.Any(char.IsControl) || !IsText(trimmed)))
        {
            Add("bad-text", member, "The text is too long or has control characters.", text, FormattableString.Invariant($"Give at most {maximum} characters without line breaks."));
        }

        return trimmed;
    }

    /// <summary>Text of several lines, trimmed; null where it is missing or blank.</summary>
    public string? OptionalText(string member, string? text, int maximum)
    {
        string? trimmed = string.IsNullOrWhiteSpace(text) ? null : text.Trim();
        if (trimmed is not null && (trimmed.Length > maximum || trimmed.Any(c => char.IsControl(c) && c is not ('\n' or '\r' or '\t')) || !IsText(trimmed)))
        {
            Add("bad-text", member, "The text is too long or has control characters.", text, FormattableString.Invariant($"Give at most {maximum} characters of text."));
        }

        return trimmed;
    }

    // Half of a surrogate pair has no UTF-8, so it could be neither stored nor digested.
    private static bool IsText(string text)
    {
        for (int i = 0; i < text.Length; i++)
        {
            bool isPair = char.IsHighSurrogate(text[i]) && i + 1 < text.Length && char.IsLowSurrogate(text[i + 1]);
            if (char.IsSurrogate(text[i]) && !isPair)
            {
                return false;
            }

            i += isPair ? 1 : 0;
        }

        return true;
    }
}
