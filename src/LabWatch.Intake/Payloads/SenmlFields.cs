namespace LabWatch.Intake.Payloads;

/// <summary>The fields of a SenML record that have been met (RFC 8428 table 1), to notice labels that stand twice.</summary>
[Flags]
internal enum SenmlFields
{
    None = 0,
    BaseName = 1,
    BaseTime = 1 << 1,
    BaseUnit = 1 << 2,
    BaseValue = 1 << 3,
    BaseSum = 1 << 4,
    BaseVersion = 1 << 5,
    Name = 1 << 6,
    Unit = 1 << 7,
    Value = 1 << 8,
    StringValue = 1 << 9,
    BooleanValue = 1 << 10,
    DataValue = 1 << 11,
    Sum = 1 << 12,
    Time = 1 << 13,
    UpdateTime = 1 << 14,

    /// <summary>The four value fields, of which a record has at most one.</summary>
    AnyValue = Value | StringValue | BooleanValue | DataValue,

    /// <summary>The fields that a record needs besides base fields to be an entry.</summary>
    Regular = Name | Unit | AnyValue | Sum | Time | UpdateTime,
}
