namespace LabWatch.Records.Audit.Verification;

/// <summary>What a cell of a table holds, whatever its column should hold.</summary>
internal enum CellKind
{
    /// <summary>NULL.</summary>
    Null,

    /// <summary>A whole number.</summary>
    Whole,

    /// <summary>A double.</summary>
    Real,

    /// <summary>A text; its bytes are UTF-8 unless they were damaged.</summary>
    Text,

    /// <summary>Bytes.</summary>
    Bytes,

    /// <summary>True or false, as 0 or 1, where the engine has such a type.</summary>
    Truth,

    /// <summary>A UUID as a text in small letters, where the engine has such a type.</summary>
    Uuid,
}
