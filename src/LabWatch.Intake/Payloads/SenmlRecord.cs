namespace LabWatch.Intake.Payloads;

/// <summary>One record as it stands, its spans pointing into the payload. Base values carry over to the next record.</summary>
internal ref struct SenmlRecord
{
    public SenmlFields Fields;
    public ReadOnlySpan<byte> BaseName;
    public ReadOnlySpan<byte> BaseUnit;
    public ReadOnlySpan<byte> Name;
    public ReadOnlySpan<byte> Unit;
    public DecimalSeconds BaseTime;
    public DecimalSeconds Time;
    public double BaseValue;

    /// <summary>Version of the pack; 0 before the first record has been read.</summary>
    public int Version;

    /// <summary>The value; NaN where the device sent null.</summary>
    public double Value;

    /// <summary>The value's bytes as sent, for findings.</summary>
    public ReadOnlySpan<byte> ValueText;

    /// <summary>Label whose value is of the wrong kind; empty where there is none.</summary>
    public ReadOnlySpan<byte> WrongLabel;

    /// <summary>Code of the reason why the record must be refused whatever else it holds.</summary>
    public string? Refusal;

    /// <summary>Starts the next record: what is not a base value is forgotten.</summary>
    public void StartNext()
    {
        Fields = SenmlFields.None;
        Name = Unit = ValueText = WrongLabel = default;
        Time = default;
        Value = double.NaN;
        Refusal = null;
    }

    /// <summary>Notes why the record is refused; the first reason stays.</summary>
    public void Refuse(string code, ReadOnlySpan<byte> label, ReadOnlySpan<byte> value)
    {
        if (Refusal is null)
        {
            Refusal = code;
            WrongLabel = label;
            ValueText = value;
        }
    }
}
