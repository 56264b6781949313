namespace LabWatch.Intake.Import;

/// <summary>How a file of delimited text becomes readings.</summary>
public sealed record ImportOrder
{
    /// <summary>Name of the column of the time.</summary>
    public required string TimeColumn { get; init; }

    /// <summary>
    /// How times are written: <c>iso</c> (RFC 3339, or the same without offset, with T or a space), <c>unix</c>, <c>unix-ms</c>, <c>unix-us</c>,
    /// or a pattern of .NET such as <c>dd.MM.yyyy HH:mm:ss</c>.
    /// </summary>
    public string TimeFormat { get; init; } = "iso";

    /// <summary>Zone of times without an offset: <c>UTC</c>, an IANA name, or a fixed offset such as <c>+01:00</c>; null where every time has one.</summary>
    public string? TimeZone { get; init; }

    /// <summary>Key of the source (<c>site.source</c> or its id alone) of channels that are named by their id alone; null where each names its source.</summary>
    public string? Source { get; init; }

    /// <summary>
    /// Wide form: columns and the channels that they lead to, as <c>COLUMN=CHANNEL</c> or <c>COLUMN=SOURCE/CHANNEL</c>, with <c>:UNIT</c> where the unit is
    /// not the channel's. Empty: every column whose name is a channel.
    /// </summary>
    public IReadOnlyList<string> Columns { get; init; } = [];

    /// <summary>Long form: the column that names the channel; null for the wide form.</summary>
    public string? ChannelColumn { get; init; }

    /// <summary>Long form: the column of the value. Default <c>value</c>.</summary>
    public string ValueColumn { get; init; } = "value";

    /// <summary>Long form: the column of the unit; null where values are in the channels' units.</summary>
    public string? UnitColumn { get; init; }

    /// <summary>What separates fields. Default a comma.</summary>
    public char Delimiter { get; init; } = ',';

    /// <summary>Whether numbers have a comma for the decimal point.</summary>
    public bool DecimalComma { get; init; }
}
