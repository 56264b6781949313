using System.Collections.Frozen;

namespace LabWatch.Intake.Units;

/// <summary>
/// The units that devices may send: names of the SenML registry (RFC 8428 section 12.1), of its secondary units (RFC 8798) and of UCUM
/// (case-sensitive column). Factors: SI Brochure 9th edition (2019) for prefixes, tables 5 and 7; ISO 80000-4 for the bar; the Fahrenheit
/// scale t/degC = (t/degF - 32) x 5/9 (NIST SP 811, 2008, appendix B.8).
/// </summary>
internal static class UnitTable
{
    /// <summary>Units that are known, and measured by no channel. Above the table that is made of them.</summary>
    private static readonly string[] Elsewhere =
    [
        "m", "kg", "g", "s", "mol", "cd", "rad", "sr", "N", "C", "F", "S", "Wb", "T", "H", "lm", "lx", "Bq", "Gy", "Sv", "kat", "J", "m2", "m3", "m/s", "m/s2", "W/m2", "cd/m2", "bit", "bit/s",
        "lat", "lon", "pH", "dB", "dBW", "Bspl", "count", "%EL", "EL", "beat/min", "beats", "S/m", "B", "VA", "VAs", "var", "vars", "J/m", "kg/m3", "deg",
    ];

    private static readonly FrozenDictionary<string, Unit> Units = All().ToFrozenDictionary(unit => unit.Name, StringComparer.Ordinal);

    /// <summary>Whether a name is known.</summary>
    public static bool IsKnown(string name) => Units.ContainsKey(name);

    /// <summary>The conversion from one unit to another; null where either is unknown or they measure different things.</summary>
    public static UnitConversion? Find(string from, string to) =>
        Units.TryGetValue(from, out Unit? source) && Units.TryGetValue(to, out Unit? target) && source.Quantity == target.Quantity
            ? Between(source, target)
            : null;

    // base = value * n / d + o for each; so target = ((source base) - o_target) * d_target / n_target.
    private static UnitConversion Between(Unit source, Unit target) => new(
        source.Numerator * target.Denominator,
        source.Denominator * target.Numerator,
        (source.Offset - target.Offset) * target.Denominator / target.Numerator);

    private static IEnumerable<Unit> All() =>
    [
        new("K", "temperature", 1, 1, 0),
        new("mK", "temperature", 1, 1_000, 0),
        new("Cel", "temperature", 1, 1, 273.15m),
        new("mCel", "temperature", 1, 1_000, 273.15m),
        new("[degF]", "temperature", 5, 9, 273.15m - (160m / 9m)),
        .. Scaled("resistance", "Ohm", "m", "k", "M"),
        .. Scaled("voltage", "V", "n", "u", "m", "k"),
        .. Scaled("current", "A", "p", "n", "u", "m", "k"),
        .. Scaled("power", "W", "u", "m", "k", "M"),
        .. Scaled("pressure", "Pa", "h", "k", "M"),
        new("mbar", "pressure", 100, 1, 0),
        new("bar", "pressure", 100_000, 1, 0),
        new("atm", "pressure", 101_325, 1, 0),
        new("/", "ratio", 1, 1, 0),
        new("1", "ratio", 1, 1, 0),
        new("%", "ratio", 1, 100, 0),
        new("/100", "ratio", 1, 100, 0),
        new("/1000", "ratio", 1, 1_000, 0),
        new("[ppth]", "ratio", 1, 1_000, 0),
        new("ppm", "ratio", 1, 1_000_000, 0),
        new("[ppm]", "ratio", 1, 1_000_000, 0),
        new("%RH", "relative humidity", 1, 1, 0),
        new("%{RH}", "relative humidity", 1, 1, 0),
        new("m3/s", "flow", 60_000, 1, 0),
        new("m3/h", "flow", 1_000, 60, 0),
        new("l/s", "flow", 60, 1, 0),
        new("L/s", "flow", 60, 1, 0),
        new("l/min", "flow", 1, 1, 0),
        new("L/min", "flow", 1, 1, 0),
        new("l/h", "flow", 1, 60, 0),
        new("L/h", "flow", 1, 60, 0),
        new("ml/min", "flow", 1, 1_000, 0),
        new("mL/min", "flow", 1, 1_000, 0),
        new("1/min", "frequency", 1, 1, 0),
        new("/min", "frequency", 1, 1, 0),
        new("1/s", "frequency", 60, 1, 0),
        new("/s", "frequency", 60, 1, 0),
        new("Hz", "frequency", 60, 1, 0),

        // Known, and measured by no channel.
        .. Elsewhere.Select(name => new Unit(name, name, 1, 1, 0)),
    ];

    private static IEnumerable<Unit> Scaled(string quantity, string name, params string[] prefixes) =>
    [
        new Unit(name, quantity, 1, 1, 0),
        .. prefixes.Select(prefix => prefix switch
        {
            "p" => new Unit(prefix + name, quantity, 1, 1_000_000_000_000, 0),
            "n" => new Unit(prefix + name, quantity, 1, 1_000_000_000, 0),
            "u" => new Unit(prefix + name, quantity, 1, 1_000_000, 0),
            "m" => new Unit(prefix + name, quantity, 1, 1_000, 0),
            "h" => new Unit(prefix + name, quantity, 100, 1, 0),
            "k" => new Unit(prefix + name, quantity, 1_000, 1, 0),
            _ => new Unit(prefix + name, quantity, 1_000_000, 1, 0),
        }),
    ];

    /// <summary>A unit: its value in the unit in which the quantity is counted here is value * numerator / denominator + offset.</summary>
    private sealed record Unit(string Name, string Quantity, decimal Numerator, decimal Denominator, decimal Offset);
}
