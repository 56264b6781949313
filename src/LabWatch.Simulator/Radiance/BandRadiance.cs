namespace LabWatch.Simulator.Radiance;

/// <summary>
/// Radiance of a blackbody in a band with uniform response (Planck's law), W m^-2 sr^-1, and the radiance temperature that belongs to a radiance.
/// The simulator keeps its own, so that nothing it publishes shares code with what judges it. Temperatures in kelvin, wavelengths in micrometres.
/// </summary>
internal sealed class BandRadiance
{
    private const double FirstRadiationConstant = 1.191042972e-16;
    private const double SecondRadiationConstant = 1.438776877e-2;

    // Gauss-Legendre, eight points (Abramowitz and Stegun, table 25.4).
    private static readonly double[] Nodes = [0.183434642495650, 0.525532409916329, 0.796666477413627, 0.960289856497536];
    private static readonly double[] Weights = [0.362683783378362, 0.313706645877887, 0.222381034453374, 0.101228536290376];

    private readonly double[] _strength;
    private readonly double[] _exponent;

    /// <summary>A band between two edges; one wavelength (radiance per metre of wavelength) where they are equal.</summary>
    public BandRadiance(double lowerMicrometre, double upperMicrometre)
    {
        List<(double Wavelength, double Weight)> points = [];
        double middle = 0.5e-6 * (lowerMicrometre + upperMicrometre);
        double half = 0.5e-6 * (upperMicrometre - lowerMicrometre);
        if (half > 0)
        {
            for (int i = 0; i < Nodes.Length; i++)
            {
                points.Add((middle - (half * Nodes[i]), half * Weights[i]));
                points.Add((middle + (half * Nodes[i]), half * Weights[i]));
            }
        }
        else
        {
            points.Add((middle, 1));
        }

        _strength = [.. points.Select(point => point.Weight * FirstRadiationConstant / Math.Pow(point.Wavelength, 5))];
        _exponent = [.. points.Select(point => SecondRadiationConstant / point.Wavelength)];
    }

    /// <summary>Radiance at a temperature.</summary>
    public double At(double kelvin)
    {
        double sum = 0;
        for (int i = 0; i < _strength.Length; i++)
        {
            sum += _strength[i] / (Math.Exp(_exponent[i] / kelvin) - 1);
        }

        return sum;
    }

    /// <summary>Radiance temperature of a positive radiance, by Newton's method on its logarithm from a first guess.</summary>
    public double Invert(double radiance, double guessKelvin)
    {
        double kelvin = guessKelvin;
        double target = Math.Log(radiance);
        for (int pass = 0; pass < 40; pass++)
        {
            (double value, double slope) = ValueAndSlope(kelvin);
            double step = (target - Math.Log(value)) * value / slope;
            kelvin = Math.Clamp(kelvin + step, 0.5 * kelvin, 2 * kelvin);
            if (Math.Abs(step) < 1e-10 * kelvin)
            {
                break;
            }
        }

        return kelvin;
    }

    private (double Value, double Slope) ValueAndSlope(double kelvin)
    {
        double value = 0;
        double slope = 0;
        for (int i = 0; i < _strength.Length; i++)
        {
            double exponential = Math.Exp(_exponent[i] / kelvin);
            double term = _strength[i] / (exponential - 1);
            value += term;
            slope += term * exponential / (exponential - 1) * _exponent[i] / (kelvin * kelvin);
        }

        return (value, slope);
    }
}
