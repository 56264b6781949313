namespace LabWatch.Metrology.Thermometry;

/// <summary>Polynomials by Horner's scheme, coefficients from the lowest power on.</summary>
internal static class Polynomial
{
    public static double Value(ReadOnlySpan<double> coefficients, double x)
    {
        double sum = 0;
        for (int i = coefficients.Length - 1; i >= 0; i--)
        {
            sum = (sum * x) + coefficients[i];
        }

        return sum;
    }

    public static double Slope(ReadOnlySpan<double> coefficients, double x)
    {
        double sum = 0;
        for (int i = coefficients.Length - 1; i >= 1; i--)
        {
            sum = (sum * x) + (i * coefficients[i]);
        }

        return sum;
    }
}
