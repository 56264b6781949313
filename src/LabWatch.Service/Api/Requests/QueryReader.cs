using System.Globalization;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Requests;

/// <summary>
/// Reads the parameters of a query and collects every finding, so that a caller learns of all mistakes at once. A parameter that the
/// endpoint does not know is a finding too: a misspelt filter must not silently return everything.
/// </summary>
internal sealed class QueryReader(IQueryCollection query)
{
    private const int MaximumCursorLength = 500;
    private readonly List<Finding> _findings = [];

    /// <summary>What is wrong, in the order met.</summary>
    public IReadOnlyList<Finding> Findings => _findings;

    /// <summary>Adds a finding about a parameter.</summary>
    public void Add(string code, string name, string message, string? value, string cure) =>
        _findings.Add(new Finding(code, "?" + name, message, Finding.Quote(value), cure));

    /// <summary>Refuses parameters other than the known ones.</summary>
    public void Allow(params ReadOnlySpan<string> known)
    {
        foreach (string name in query.Keys)
        {
            if (!known.Contains(name, StringComparer.OrdinalIgnoreCase))
            {
                Add("unknown-parameter", Finding.Quote(name)!, "This query has no such parameter.", query[name], "Use: " + string.Join(", ", known.ToArray()) + ".");
            }
        }
    }

    /// <summary>The text of a parameter; null where it is missing or empty. Given twice is a finding.</summary>
    public string? Text(string name)
    {
        Microsoft.Extensions.Primitives.StringValues values = query[name];
        if (values.Count > 1)
        {
            Add("given-twice", name, "The parameter is given more than once.", values.ToString(), "Give it once.");
        }

        return values.Count == 1 && !string.IsNullOrEmpty(values[0]) ? values[0] : null;
    }

    /// <summary>An instant; null where missing or wrong.</summary>
    public Instant? Time(string name)
    {
        string? text = Text(name);
        if (text is null)
        {
            return null;
        }

        // A plus sign that was not percent-encoded arrives as a space.
        if (Instant.TryParse(text.Replace(' ', '+'), out Instant instant))
        {
            return instant;
        }

        Add("not-a-time", name, "This is not a time with an offset.", text, "Write RFC 3339, for example 2026-12-01T08:15:00Z.");
        return null;
    }

    /// <summary>A whole number within bounds; the default where missing or wrong.</summary>
    public int Count(string name, int byDefault, int maximum)
    {
        string? text = Text(name);
        if (text is null)
        {
            return byDefault;
        }

        if (int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int count) && count >= 1 && count <= maximum)
        {
            return count;
        }

        Add("out-of-range", name, "The number of rows on a page is out of range.", text, string.Create(CultureInfo.InvariantCulture, $"Give a whole number from 1 to {maximum}."));
        return byDefault;
    }

    /// <summary>true or false; false where missing or wrong.</summary>
    public bool Flag(string name)
    {
        string? text = Text(name);
        if (text is not (null or "true" or "false"))
        {
            Add("not-a-flag", name, "This is neither true nor false.", text, "Give true or false.");
        }

        return text == "true";
    }

    /// <summary>The key of a source; null where missing or wrong.</summary>
    public SourceKey? Source(string name)
    {
        string? text = Text(name);
        if (text is null || SourceKey.TryParse(text, out _))
        {
            return text is null ? null : Parsed(text);
        }

        Add("not-a-source", name, "This is not the key of a source.", text, "Write site.source, for example hollin-vale.fir.");
        return null;
    }

    /// <summary>The code of a criterion; null where missing or wrong.</summary>
    public string? Criterion(string name)
    {
        string? text = Text(name);
        if (text is not null && !CriterionCode.All.Contains(text, StringComparer.Ordinal))
        {
            Add("unknown-criterion", name, "There is no such criterion.", text, "Use one of: " + string.Join(", ", CriterionCode.All) + ".");
            return null;
        }

        return text;
    }

    /// <summary>A cursor from the page before; null where missing or wrong.</summary>
    public string? Cursor(string name)
    {
        string? text = Text(name);
        if (text?.Length > MaximumCursorLength)
        {
            Add("not-a-cursor", name, "This is no cursor of this list.", text, "Pass `next` of the page before unchanged.");
            return null;
        }

        return text;
    }

    /// <summary>A window of time from two parameters, both or neither given; null where missing or wrong.</summary>
    public TimeWindow? Window(string fromName, string toName)
    {
        Instant? from = Time(fromName);
        Instant? to = Time(toName);
        return (from, to) switch
        {
            ({ } start, { } end) => Ordered(start, end, toName),
            ({ } start, null) when Text(toName) is null => new TimeWindow(start, Instant.MaxValue),
            (null, { } end) when Text(fromName) is null => new TimeWindow(Instant.MinValue, end),
            _ => null,
        };
    }

    /// <summary>The window where the start is before the end; else a finding and null.</summary>
    public TimeWindow? Ordered(Instant start, Instant end, string toName)
    {
        if (start < end)
        {
            return new TimeWindow(start, end);
        }

        Add("window-empty", toName, "The end of the window is not after its start.", end.ToString(), "Let `to` be later than `from`.");
        return null;
    }

    private static SourceKey Parsed(string text) => SourceKey.TryParse(text, out SourceKey key) ? key : default;
}
