using LabWatch.Metrology.Numerics;
using MathNet.Numerics;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// Student's t distribution with real degrees of freedom: tail by the incomplete beta function (Abramowitz and Stegun 26.5.8 as a continued
/// fraction, 26.7.1), quantile by Newton's method. Relative accuracy about 1e-12 (checked to 1e-9). Infinite degrees of freedom mean normal.
/// </summary>
public static class StudentDistribution
{
    /// <summary>Degrees of freedom above which expansions about the normal distribution are exact to double precision for our purposes.</summary>
    private const double NearlyNormal = 1e5;

    /// <summary>Probability density at t; degrees of freedom positive.</summary>
    public static double Density(double t, double degreesOfFreedom) =>
        double.IsPositiveInfinity(degreesOfFreedom)
            ? NormalDistribution.Density(t)
            : Math.Exp(LogGammaRatio(degreesOfFreedom / 2) - (0.5 * (degreesOfFreedom + 1) * Elementary.LogOnePlus(t * t / degreesOfFreedom)))
                / Math.Sqrt(Math.PI * degreesOfFreedom);

    /// <summary>Probability of a value up to t; degrees of freedom positive, else NaN.</summary>
    public static double Cdf(double t, double degreesOfFreedom) => UpperTail(-t, degreesOfFreedom);

    /// <summary>Probability of a value above t; degrees of freedom positive, else NaN.</summary>
    public static double UpperTail(double t, double degreesOfFreedom)
    {
        double nu = degreesOfFreedom;
        if (!(nu > 0) || double.IsNaN(t))
        {
            return double.NaN;
        }

        if (t < 0)
        {
            return 1 - UpperTail(-t, nu);
        }

        if (double.IsPositiveInfinity(t))
        {
            return 0;
        }

        // Above NearlyNormal: Wallace (1959), error of the order 1/nu^2.
        return nu > NearlyNormal ? NormalDistribution.UpperTail(NormalEquivalent(t, nu)) : 0.5 * IncompleteBeta(t * t, nu);
    }

    /// <summary>The t that is exceeded with a probability, 0 to 1 (infinite at the ends); NaN outside, or where degrees of freedom are not positive.</summary>
    public static double UpperQuantile(double probability, double degreesOfFreedom)
    {
        double nu = degreesOfFreedom;
        double z = NormalDistribution.UpperQuantile(probability);
        if (!(nu > 0) || double.IsNaN(z) || double.IsInfinity(z) || double.IsPositiveInfinity(nu))
        {
            return nu > 0 ? z : double.NaN;
        }

        if (probability > 0.5)
        {
            return -UpperQuantile(1 - probability, nu);
        }

        return nu > NearlyNormal ? CornishFisher(z, nu) : RootFromBelow(z, probability, nu);
    }

    /// <summary>
    /// The tail is convex for t above 0 and heavier than the normal one, so that Newton's method from the normal quantile rises to the root
    /// and never passes it.
    /// </summary>
    private static double RootFromBelow(double start, double probability, double nu)
    {
        double t = start;
        for (int step = 0; step < 500; step++)
        {
            double change = (UpperTail(t, nu) - probability) / Density(t, nu);
            t += change;
            if (!(Math.Abs(change) > 1e-14 * Math.Abs(t)))
            {
                break;
            }
        }

        return t;
    }

    /// <summary>Abramowitz and Stegun 26.7.5, first two terms.</summary>
    private static double CornishFisher(double z, double nu)
    {
        double square = z * z;
        return z * (1 + ((square + 1) / (4 * nu)) + (((((5 * square) + 16) * square) + 3) / (96 * nu * nu)));
    }

    /// <summary>The z of which the normal tail equals the tail of t, for large nu: the inverse of <see cref="CornishFisher"/> to second order.</summary>
    private static double NormalEquivalent(double t, double nu)
    {
        if (double.IsPositiveInfinity(nu))
        {
            return t;
        }

        double z = t;
        for (int step = 0; step < 4; step++)
        {
            z -= CornishFisher(z, nu) - t;
        }

        return z;
    }

    /// <summary>I_x(nu/2, 1/2) with x = nu/(nu + t^2), by the continued fraction on whichever side converges.</summary>
    private static double IncompleteBeta(double tSquare, double nu)
    {
        double a = nu / 2;
        const double b = 0.5;
        double x = nu / (nu + tSquare);
        double rest = tSquare / (nu + tSquare);
        if (rest == 0)
        {
            return 1;
        }

        // x^a (1-x)^b / B(a, b), with B(a, 1/2) = sqrt(pi) Gamma(a) / Gamma(a + 1/2).
        double front = Math.Exp((-a * Elementary.LogOnePlus(tSquare / nu)) + LogGammaRatio(a)) * Math.Sqrt(rest / Math.PI);
        return x < (a + 1) / (a + b + 2)
            ? front * ContinuedFraction(x, a, b) / a
            : 1 - (front * ContinuedFraction(rest, b, a) / b);
    }

    private static double ContinuedFraction(double x, double a, double b)
    {
        const double tiny = 1e-300;
        double c = 1;
        double d = 1 / NotZero(1 - ((a + b) * x / (a + 1)));
        double h = d;
        for (int m = 1; m <= 2000; m++)
        {
            double even = m * (b - m) * x / ((a + (2 * m) - 1) * (a + (2 * m)));
            d = 1 / NotZero(1 + (even * d));
            c = NotZero(1 + (even / c));
            h *= d * c;
            double odd = -(a + m) * (a + b + m) * x / ((a + (2 * m)) * (a + (2 * m) + 1));
            d = 1 / NotZero(1 + (odd * d));
            c = NotZero(1 + (odd / c));
            double factor = d * c;
            h *= factor;
            if (Math.Abs(factor - 1) < 1e-16)
            {
                break;
            }
        }

        return h;

        static double NotZero(double value) => Math.Abs(value) < tiny ? tiny : value;
    }

    /// <summary>ln(Gamma(a + 1/2) / Gamma(a)); an asymptotic series where the difference of two large logarithms would lose digits.</summary>
    private static double LogGammaRatio(double a)
    {
        if (a < 20)
        {
            return SpecialFunctions.GammaLn(a + 0.5) - SpecialFunctions.GammaLn(a);
        }

        double inverse = 1 / a;
        double square = inverse * inverse;
        return (0.5 * Math.Log(a)) - (inverse * ((1 / 8.0) - (square * ((1 / 192.0) - (square * ((1 / 640.0) - (square * 17 / 14336)))))));
    }
}
