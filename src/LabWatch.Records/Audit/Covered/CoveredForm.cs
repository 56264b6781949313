namespace LabWatch.Records.Audit.Covered;

/// <summary>How the values of a column stand in the canonical form of a row.</summary>
internal enum CoveredForm
{
    /// <summary>A text.</summary>
    Text,

    /// <summary>A whole number.</summary>
    Whole,

    /// <summary>A double.</summary>
    Real,

    /// <summary>True or false.</summary>
    Truth,

    /// <summary>A UUID, as a text in small letters.</summary>
    Uuid,

    /// <summary>Bytes, as a text of small hexadecimal digits.</summary>
    Bytes,
}
