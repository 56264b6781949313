namespace LabWatch.Service.Calc;

/// <summary>
/// One member of a calculator's input: the one description from which the JSON Schema, the documentation and the check of the input are made.
/// </summary>
/// <param name="Name">Name of the member, the unit at its end (<c>t_c</c>, <c>r_ohm</c>).</param>
/// <param name="Description">What it is, with unit.</param>
/// <param name="Kind">What it holds.</param>
internal sealed record CalcField(string Name, string Description, CalcFieldKind Kind)
{
    /// <summary>Most items of an array unless said otherwise.</summary>
    public const int DefaultMaximumItems = 1_000_000;

    /// <summary>Whether it must be there.</summary>
    public bool Required { get; init; } = true;

    /// <summary>Smallest permitted number, or item of an array of numbers.</summary>
    public double Minimum { get; init; } = double.NegativeInfinity;

    /// <summary>Largest permitted number, or item of an array of numbers.</summary>
    public double Maximum { get; init; } = double.PositiveInfinity;

    /// <summary>Whether <see cref="Minimum"/> itself is not permitted.</summary>
    public bool IsAboveMinimum { get; init; }

    /// <summary>Words of a choice.</summary>
    public IReadOnlyList<string> Choices { get; init; } = [];

    /// <summary>Members of an object, or of each object of an array.</summary>
    public IReadOnlyList<CalcField> Fields { get; init; } = [];

    /// <summary>Fewest items of an array.</summary>
    public int MinimumItems { get; init; } = 1;

    /// <summary>Most items of an array.</summary>
    public int MaximumItems { get; init; } = DefaultMaximumItems;

    /// <summary>Whether null stands for a missing value in an array of numbers.</summary>
    public bool AllowsGaps { get; init; }

    /// <summary>A number.</summary>
    public static CalcField Number(string name, string description) => new(name, description, CalcFieldKind.Number);

    /// <summary>A number above zero.</summary>
    public static CalcField Positive(string name, string description) =>
        Number(name, description) with { Minimum = 0, IsAboveMinimum = true };

    /// <summary>A number from zero on, such as an uncertainty.</summary>
    public static CalcField NotNegative(string name, string description) => Number(name, description) with { Minimum = 0 };

    /// <summary>A temperature in degree Celsius, from absolute zero on.</summary>
    public static CalcField Celsius(string name, string description) => Number(name, description) with { Minimum = -273.15, Maximum = 1e5 };

    /// <summary>A whole number within bounds, both included.</summary>
    public static CalcField Integer(string name, string description, long minimum, long maximum) =>
        new(name, description, CalcFieldKind.Integer) { Minimum = minimum, Maximum = maximum };

    /// <summary>True or false, false where it is missing.</summary>
    public static CalcField Flag(string name, string description) => new(name, description, CalcFieldKind.Flag) { Required = false };

    /// <summary>One of a list of words.</summary>
    public static CalcField Choice(string name, string description, params IReadOnlyList<string> choices) =>
        new(name, description, CalcFieldKind.Choice) { Choices = choices };

    /// <summary>Free text.</summary>
    public static CalcField Text(string name, string description) => new(name, description, CalcFieldKind.Text);

    /// <summary>An array of numbers.</summary>
    public static CalcField Numbers(string name, string description) => new(name, description, CalcFieldKind.Numbers);

    /// <summary>An object.</summary>
    public static CalcField Object(string name, string description, params IReadOnlyList<CalcField> fields) =>
        new(name, description, CalcFieldKind.Object) { Fields = fields };

    /// <summary>An array of objects.</summary>
    public static CalcField Objects(string name, string description, params IReadOnlyList<CalcField> fields) =>
        new(name, description, CalcFieldKind.Objects) { Fields = fields };

    /// <summary>The same member, not required.</summary>
    public CalcField Optional() => this with { Required = false };
}
