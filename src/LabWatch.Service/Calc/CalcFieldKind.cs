namespace LabWatch.Service.Calc;

/// <summary>What a member of a calculator's input holds.</summary>
internal enum CalcFieldKind
{
    /// <summary>A finite number.</summary>
    Number,

    /// <summary>A whole number.</summary>
    Integer,

    /// <summary>True or false.</summary>
    Flag,

    /// <summary>One of a list of words.</summary>
    Choice,

    /// <summary>Free text.</summary>
    Text,

    /// <summary>An array of numbers.</summary>
    Numbers,

    /// <summary>An object with members of its own.</summary>
    Object,

    /// <summary>An array of objects.</summary>
    Objects,
}
