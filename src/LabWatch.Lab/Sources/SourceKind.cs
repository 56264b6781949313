namespace LabWatch.Lab.Sources;

/// <summary>What a reference source is built as.</summary>
public enum SourceKind
{
    /// <summary>A cavity in a stirred bath, about -40 to 250 degC.</summary>
    StirredBath,

    /// <summary>A cavity in a heat pipe or metal block furnace, about 50 to 1100 degC.</summary>
    BlockFurnace,

    /// <summary>A graphite tube furnace under argon, about 500 to 3000 degC.</summary>
    GraphiteTube,

    /// <summary>A fixed reference near 37 degC.</summary>
    FixedReference,

    /// <summary>A flat plate for imagers and hand-held work.</summary>
    FlatPlate,

    /// <summary>A fixed-point cell, used on its plateau.</summary>
    FixedPointCell,
}
