namespace LabWatch.Lab.Findings;

/// <summary>
/// One thing wrong with an input from outside (lab file, option, payload, import, request): what, where, the value met, and the cure.
/// Bad input is always a list of findings; exceptions are for defects and for I/O.
/// </summary>
/// <param name="Code">Stable machine name, a slug such as <c>unit-mismatch</c>.</param>
/// <param name="Where">JSON Pointer (RFC 6901), option name, topic, or file and line.</param>
/// <param name="Message">What is wrong, one sentence.</param>
/// <param name="Value">The value met, as text cut to a readable length; null where nothing was there.</param>
/// <param name="Cure">What to do about it, one sentence.</param>
public sealed record Finding(string Code, string Where, string Message, string? Value, string Cure)
{
    /// <summary>Longest value that a finding quotes, in characters; longer ones are cut.</summary>
    public const int MaximumQuotedLength = 200;

    /// <summary>One line for a person: where, what, the value in brackets, the cure.</summary>
    public override string ToString() =>
        Value is null ? $"{Where}: {Message} {Cure}" : $"{Where}: {Message} [{Value}] {Cure}";

    /// <summary>Cuts a value to <see cref="MaximumQuotedLength"/> and replaces control characters, so that hostile input cannot garble a log.</summary>
    public static string? Quote(string? value)
    {
        if (value is null)
        {
            return null;
        }

        ReadOnlySpan<char> shown = value.AsSpan(0, Math.Min(value.Length, MaximumQuotedLength));
        string clean = string.Create(shown.Length, shown, static (target, from) =>
        {
            for (int i = 0; i < from.Length; i++)
            {
                target[i] = char.IsControl(from[i]) || char.IsSurrogate(from[i]) ? '\uFFFD' : from[i];
            }
        });
        return value.Length > MaximumQuotedLength ? clean + "..." : clean;
    }
}
