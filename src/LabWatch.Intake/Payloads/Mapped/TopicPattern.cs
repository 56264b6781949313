namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>A pattern of topics: levels as they stand, <c>+</c> for any one level, <c>{source}</c> for the id of a source.</summary>
internal sealed class TopicPattern(string text)
{
    /// <summary>The level that stands for the id of a source.</summary>
    public const string SourceLevel = "{source}";

    private readonly string[] _levels = text.Split('/');

    /// <summary>What to subscribe to.</summary>
    public string Filter { get; } = text.Replace(SourceLevel, "+", StringComparison.Ordinal);

    /// <summary>Whether a text is a pattern.</summary>
    public static bool IsValid(string text)
    {
        string[] levels = text.Split('/');
        return text.Length is > 0 and <= 1_000
            && !levels[0].StartsWith('$')
            && levels.Count(level => level == SourceLevel) <= 1
            && levels.All(level => level is "+" or SourceLevel || (level.Length > 0 && level.AsSpan().IndexOfAny("+#{}\0") < 0));
    }

    /// <summary>Whether a topic fits, and the level in the place of <c>{source}</c> (null where the pattern has none).</summary>
    public bool Matches(string topic, out string? source)
    {
        source = null;
        int from = 0;
        for (int i = 0; i < _levels.Length; i++)
        {
            int slash = topic.IndexOf('/', from);
            bool isLast = i == _levels.Length - 1;
            if (isLast != (slash < 0))
            {
                return false;
            }

            ReadOnlySpan<char> level = isLast ? topic.AsSpan(from) : topic.AsSpan(from, slash - from);
            if (_levels[i] == SourceLevel)
            {
                source = level.ToString();
            }
            else if (_levels[i] != "+" && !level.SequenceEqual(_levels[i]))
            {
                return false;
            }

            from = slash + 1;
        }

        return true;
    }
}
