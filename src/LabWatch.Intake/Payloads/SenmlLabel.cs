namespace LabWatch.Intake.Payloads;

/// <summary>The labels of SenML JSON (RFC 8428 table 1).</summary>
internal static class SenmlLabel
{
    /// <summary>The field of a label; <see cref="SenmlFields.None"/> for a label that is not of this standard.</summary>
    public static SenmlFields Parse(ReadOnlySpan<byte> label) => label.Length switch
    {
        1 => label[0] switch
        {
            (byte)'n' => SenmlFields.Name,
            (byte)'u' => SenmlFields.Unit,
            (byte)'v' => SenmlFields.Value,
            (byte)'s' => SenmlFields.Sum,
            (byte)'t' => SenmlFields.Time,
            _ => SenmlFields.None,
        },
        2 => (label[0], label[1]) switch
        {
            ((byte)'b', (byte)'n') => SenmlFields.BaseName,
            ((byte)'b', (byte)'t') => SenmlFields.BaseTime,
            ((byte)'b', (byte)'u') => SenmlFields.BaseUnit,
            ((byte)'b', (byte)'v') => SenmlFields.BaseValue,
            ((byte)'b', (byte)'s') => SenmlFields.BaseSum,
            ((byte)'v', (byte)'s') => SenmlFields.StringValue,
            ((byte)'v', (byte)'b') => SenmlFields.BooleanValue,
            ((byte)'v', (byte)'d') => SenmlFields.DataValue,
            ((byte)'u', (byte)'t') => SenmlFields.UpdateTime,
            _ => SenmlFields.None,
        },
        4 when label.SequenceEqual("bver"u8) => SenmlFields.BaseVersion,
        _ => SenmlFields.None,
    };
}
