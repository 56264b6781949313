using LabWatch.Intake.Options;

namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>A mapping, made ready. Its options must have no findings.</summary>
internal sealed class PayloadMapping
{
    public PayloadMapping(MappingOptions options)
    {
        Options = options;
        Pattern = new TopicPattern(options.Topic);
        Items = options.Items is { } items ? Parse(items) : null;
        Time = options.Time is { } time ? Parse(time) : null;
        Values = [.. options.Values.Select(value => new MappedValue(Parse(value.At), value.Channel, value.Unit is { } unit ? System.Text.Encoding.UTF8.GetBytes(unit) : []))];
    }

    public MappingOptions Options { get; }

    public TopicPattern Pattern { get; }

    public JsonPointer? Items { get; }

    public JsonPointer? Time { get; }

    public IReadOnlyList<MappedValue> Values { get; }

    private static JsonPointer Parse(string text) =>
        JsonPointer.TryParse(text, out JsonPointer pointer) ? pointer : throw new ArgumentException("This is no JSON Pointer.", nameof(text));
}
