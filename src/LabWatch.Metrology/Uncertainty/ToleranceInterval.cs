namespace LabWatch.Metrology.Uncertainty;

/// <summary>Interval of permissible values of a property, ends included (JCGM 106:2012, 3.3.5).</summary>
/// <param name="Lower">Lower tolerance limit; negative infinity where open.</param>
/// <param name="Upper">Upper tolerance limit, not below the lower; positive infinity where open.</param>
public readonly record struct ToleranceInterval(double Lower, double Upper)
{
    /// <summary>Every value up to a limit.</summary>
    public static ToleranceInterval AtMost(double upper) => new(double.NegativeInfinity, upper);

    /// <summary>Every value from a limit on.</summary>
    public static ToleranceInterval AtLeast(double lower) => new(lower, double.PositiveInfinity);

    /// <summary>Every value of a magnitude up to a limit (zero or positive).</summary>
    public static ToleranceInterval Symmetric(double magnitude) => new(-magnitude, magnitude);

    /// <summary>Whether a value lies inside; false for NaN.</summary>
    public bool Contains(double value) => value >= Lower && value <= Upper;

    /// <summary>
    /// The interval with both limits moved inwards by a guard band: the acceptance interval of guarded acceptance (JCGM 106:2012, 8.3.2).
    /// It contains nothing where the guard bands meet. A negative guard band moves the limits outwards.
    /// </summary>
    public ToleranceInterval Guarded(double guardBand) => new(Lower + guardBand, Upper - guardBand);
}
