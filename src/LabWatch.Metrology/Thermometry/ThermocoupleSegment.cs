namespace LabWatch.Metrology.Thermometry;

/// <summary>One piece of a reference function: a polynomial, for type K above 0 degC with the term a0 exp(a1 (t - a2)^2).</summary>
/// <param name="Minimum">Lower end, degree Celsius.</param>
/// <param name="Maximum">Upper end, degree Celsius.</param>
/// <param name="Coefficients">Coefficients, lowest power first, millivolt.</param>
/// <param name="Exponential">a0 (millivolt), a1 (1/degC^2), a2 (degC); null where there is no such term.</param>
internal sealed record ThermocoupleSegment(
    double Minimum, double Maximum, double[] Coefficients, (double A0, double A1, double A2)? Exponential = null)
{
    /// <summary>Emf, millivolt.</summary>
    public double Emf(double celsius) => Polynomial.Value(Coefficients, celsius) + ExponentialTerm(celsius);

    /// <summary>dE/dt, millivolt per kelvin.</summary>
    public double Slope(double celsius) =>
        Polynomial.Slope(Coefficients, celsius)
        + (Exponential is { } e ? 2 * e.A1 * (celsius - e.A2) * ExponentialTerm(celsius) : 0);

    private double ExponentialTerm(double celsius) =>
        Exponential is { } e ? e.A0 * Math.Exp(e.A1 * (celsius - e.A2) * (celsius - e.A2)) : 0;
}
