using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// Integrals of Planck's law over wavelength, by its two classical series (in heat-transfer texts as the blackbody fraction; Siegel and Howell,
/// appendix A): from x on, sum of exp(-n x) (x^3/n + 3 x^2/n^2 + 6 x/n^3 + 6/n^4); below x, the Bernoulli series of x^3/(exp(x) - 1).
/// Relative accuracy about 1e-14, of a difference over a narrow band by quadrature instead.
/// </summary>
public static class BlackbodyIntegral
{
    private const double PiToTheFourth = Math.PI * Math.PI * Math.PI * Math.PI;
    private const double SeriesBorder = 1;

    /// <summary>c1L / c2^4 in W m^-2 sr^-1 K^-4.</summary>
    private const double Scale = RadiationConstants.FirstOfRadiance
        / (RadiationConstants.Second * RadiationConstants.Second * RadiationConstants.Second * RadiationConstants.Second);

    /// <summary>B(k) / k! / (k + 3) for k = 0, 2, 4, ...: coefficients of the integral of x^3/(exp(x) - 1), the term of k = 1 apart.</summary>
    private static readonly double[] Bernoulli =
    [
        1.0 / 3, 1.0 / 60, -1.0 / 5040, 1.0 / 272160, -1.0 / 13305600, 1.0 / 622702080, -691.0 / 19615115520000.0, 1.0 / 1270312243200.0,
        -3617.0 / 202741834014720000.0, 43867.0 / 107290978560589824000.0, -174611.0 / 18465726242060697600000.0,
    ];

    // Nodes and weights of Gauss-Legendre quadrature with 12 points on (-1, 1): positive nodes (Abramowitz and Stegun, table 25.4).
    private static readonly double[] GaussNodes =
        [0.125233408511468916, 0.367831498998180194, 0.587317954286617447, 0.769902674194304687, 0.904117256370474857, 0.981560634246719251];

    private static readonly double[] GaussWeights =
        [0.249147045813402785, 0.233492536538354809, 0.203167426723065922, 0.160078328543346226, 0.106939325995318431, 0.047175336386511827];

    /// <summary>Fraction of a blackbody's radiance below a wavelength, F(0 -> lambda T), 0 to 1.</summary>
    /// <param name="micrometreKelvin">Product of wavelength and temperature, um K, not negative.</param>
    public static double Fraction(double micrometreKelvin) =>
        micrometreKelvin > 0 ? 15 / PiToTheFourth * Above(PlanckLaw.SecondMicrometre / micrometreKelvin) : 0;

    /// <summary>The product lambda T, um K, below which a fraction of the radiance lies; NaN outside 0 to 1, ends excluded.</summary>
    public static double ProductOfFraction(double fraction)
    {
        if (!(fraction > 0 && fraction < 1))
        {
            return double.NaN;
        }

        double low = 0;
        double high = Math.Log(1e9);
        double logProduct = Math.Log(4000);
        for (int step = 0; step < 200; step++)
        {
            double product = Math.Exp(logProduct);
            double error = Fraction(product) - fraction;
            (low, high) = error > 0 ? (low, logProduct) : (logProduct, high);
            double x = PlanckLaw.SecondMicrometre / product;

            // dF/d(ln lambda T) = (15/pi^4) x^4/(exp(x) - 1)
            double change = error / (15 / PiToTheFourth * x * x * x * x / Elementary.ExpMinusOne(x));
            double next = logProduct - change;
            if (Math.Abs(change) < 1e-14)
            {
                break;
            }

            logProduct = next > low && next < high ? next : 0.5 * (low + high);
        }

        return Math.Exp(logProduct);
    }

    /// <summary>Radiance of a blackbody between two wavelengths, W m^-2 sr^-1.</summary>
    /// <param name="lowerMicrometre">Lower edge, positive.</param>
    /// <param name="upperMicrometre">Upper edge, above the lower; infinity is the whole spectrum above the lower edge.</param>
    /// <param name="kelvin">Temperature, positive.</param>
    public static double BandRadiance(double lowerMicrometre, double upperMicrometre, double kelvin)
    {
        if (upperMicrometre - lowerMicrometre < 0.02 * lowerMicrometre)
        {
            return Quadrature(lowerMicrometre, upperMicrometre, kelvin, PlanckLaw.Radiance);
        }

        (double upper, double lower) = Edges(lowerMicrometre, upperMicrometre, kelvin);
        double square = kelvin * kelvin;
        return Scale * square * square * Between(upper, lower);
    }

    /// <summary>dL/dT of <see cref="BandRadiance"/>, W m^-2 sr^-1 K^-1.</summary>
    public static double BandRadianceSlope(double lowerMicrometre, double upperMicrometre, double kelvin)
    {
        if (upperMicrometre - lowerMicrometre < 0.02 * lowerMicrometre)
        {
            return Quadrature(lowerMicrometre, upperMicrometre, kelvin, PlanckLaw.RadianceSlope);
        }

        (double upper, double lower) = Edges(lowerMicrometre, upperMicrometre, kelvin);
        return Scale * kelvin * kelvin * kelvin * ((4 * Between(upper, lower)) + EdgeTerm(upper) - EdgeTerm(lower));
    }

    private static (double Upper, double Lower) Edges(double lowerMicrometre, double upperMicrometre, double kelvin) =>
        (PlanckLaw.SecondMicrometre / (upperMicrometre * kelvin), PlanckLaw.SecondMicrometre / (lowerMicrometre * kelvin));

    /// <summary>x^4 / (exp(x) - 1), 0 at 0.</summary>
    private static double EdgeTerm(double x) => x > 0 ? x * x * x * x / Elementary.ExpMinusOne(x) : 0;

    /// <summary>Integral of x^3/(exp(x) - 1) from one x to a larger one; from below where both lie there, so that small differences keep their digits.</summary>
    private static double Between(double from, double to) =>
        to <= SeriesBorder ? Below(to) - Below(from) : Above(from) - Above(to);

    private static double Above(double x) =>
        x < SeriesBorder ? (PiToTheFourth / 15) - Below(x) : ExponentialSeries(x);

    private static double ExponentialSeries(double x)
    {
        double decay = Math.Exp(-x);
        double power = 1;
        double sum = 0;
        for (int n = 1; n <= 40; n++)
        {
            power *= decay;
            double inverse = 1.0 / n;
            double term = power * inverse * ((x * x * x) + (inverse * ((3 * x * x) + (inverse * ((6 * x) + (6 * inverse))))));
            sum += term;
            if (term < 1e-17 * sum)
            {
                break;
            }
        }

        return sum;
    }

    private static double Below(double x)
    {
        double square = x * x;
        double sum = 0;
        for (int i = Bernoulli.Length - 1; i >= 0; i--)
        {
            sum = (sum * square) + Bernoulli[i];
        }

        return x * square * (sum - (x / 8));
    }

    private static double Quadrature(double lower, double upper, double kelvin, Func<double, double, double> spectral)
    {
        double centre = 0.5 * (lower + upper);
        double half = 0.5 * (upper - lower);
        double sum = 0;
        for (int i = 0; i < GaussNodes.Length; i++)
        {
            double offset = half * GaussNodes[i];
            sum += GaussWeights[i] * (spectral(centre - offset, kelvin) + spectral(centre + offset, kelvin));
        }

        return half * sum;
    }
}
