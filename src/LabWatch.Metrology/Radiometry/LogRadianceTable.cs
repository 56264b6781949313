namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// ln L as a function of ln T in equal pieces, each a polynomial of degree 7 through Chebyshev nodes, and its inverse by two steps of Newton's
/// method inside the piece.
/// </summary>
internal sealed class LogRadianceTable
{
    private const int Pieces = 64;
    private const int Terms = 8;

    private readonly double _start;
    private readonly double _width;
    private readonly double _piecesPerUnit;
    private readonly double _minimumKelvin;
    private readonly double _maximumKelvin;

    /// <summary>Coefficients of the powers of the place in a piece (-1 to 1), lowest first, one piece after the other.</summary>
    private readonly double[] _coefficients = new double[Pieces * Terms];

    /// <summary>ln L at the borders of the pieces.</summary>
    private readonly double[] _borders = new double[Pieces + 1];

    public LogRadianceTable(double minimumKelvin, double maximumKelvin, Func<double, double> logRadiance)
    {
        _minimumKelvin = minimumKelvin;
        _maximumKelvin = maximumKelvin;
        _start = Math.Log(minimumKelvin);
        _width = (Math.Log(maximumKelvin) - _start) / Pieces;
        _piecesPerUnit = 1 / _width;
        for (int piece = 0; piece < Pieces; piece++)
        {
            Fit(piece, logRadiance);
        }

        for (int border = 0; border <= Pieces; border++)
        {
            _borders[border] = logRadiance(Math.Exp(_start + (border * _width)));
        }
    }

    public double LowestLogRadiance => _borders[0];

    public bool Covers(double kelvin) => kelvin >= _minimumKelvin && kelvin <= _maximumKelvin;

    public bool CoversLogRadiance(double logRadiance) => logRadiance >= _borders[0] && logRadiance <= _borders[Pieces];

    /// <summary>ln L at a ln T inside the table.</summary>
    public double LogRadiance(double logKelvin)
    {
        double place = (logKelvin - _start) * _piecesPerUnit;
        int piece = Math.Clamp((int)place, 0, Pieces - 1);
        return Value(_coefficients.AsSpan(piece * Terms, Terms), (2 * (place - piece)) - 1);
    }

    /// <summary>ln T of a ln L inside the table.</summary>
    public double LogKelvin(double logRadiance)
    {
        int piece = PieceOf(logRadiance);
        ReadOnlySpan<double> c = _coefficients.AsSpan(piece * Terms, Terms);
        double s = (2 * (logRadiance - _borders[piece]) / (_borders[piece + 1] - _borders[piece])) - 1;
        s -= Step(c, s, logRadiance);
        s -= Step(c, s, logRadiance);
        return _start + ((piece + (0.5 * (s + 1))) * _width);
    }

    private static double Value(ReadOnlySpan<double> c, double s) =>
        c[0] + (s * (c[1] + (s * (c[2] + (s * (c[3] + (s * (c[4] + (s * (c[5] + (s * (c[6] + (s * c[7])))))))))))));

    private static double Slope(ReadOnlySpan<double> c, double s) =>
        c[1] + (s * ((2 * c[2]) + (s * ((3 * c[3]) + (s * ((4 * c[4]) + (s * ((5 * c[5]) + (s * ((6 * c[6]) + (s * 7 * c[7])))))))))));

    private static double Step(ReadOnlySpan<double> c, double s, double target) => (Value(c, s) - target) / Slope(c, s);

    private int PieceOf(double logRadiance)
    {
        int low = 0;
        for (int half = Pieces / 2; half > 0; half /= 2)
        {
            low = _borders[low + half] <= logRadiance ? low + half : low;
        }

        return low;
    }

    /// <summary>Chebyshev interpolation, turned into powers; exact enough at this degree on -1 to 1.</summary>
    private void Fit(int piece, Func<double, double> logRadiance)
    {
        double[] samples = new double[Terms];
        double centre = _start + ((piece + 0.5) * _width);
        for (int k = 0; k < Terms; k++)
        {
            samples[k] = logRadiance(Math.Exp(centre + (0.5 * _width * Math.Cos(Math.PI * (k + 0.5) / Terms))));
        }

        double[] previous = new double[Terms];
        double[] current = new double[Terms];
        previous[0] = 1;
        current[1] = 1;
        Span<double> target = _coefficients.AsSpan(piece * Terms, Terms);
        for (int degree = 0; degree < Terms; degree++)
        {
            double sum = 0;
            for (int k = 0; k < Terms; k++)
            {
                sum += samples[k] * Math.Cos(Math.PI * degree * (k + 0.5) / Terms);
            }

            double[] polynomial = degree == 0 ? previous : current;
            double weight = sum * (degree == 0 ? 1 : 2) / Terms;
            for (int power = 0; power < Terms; power++)
            {
                target[power] += weight * polynomial[power];
            }

            if (degree > 0)
            {
                (previous, current) = (current, Next(previous, current));
            }
        }
    }

    /// <summary>T(n+1) = 2 s T(n) - T(n-1).</summary>
    private static double[] Next(double[] previous, double[] current)
    {
        double[] next = new double[Terms];
        for (int power = 0; power < Terms; power++)
        {
            next[power] = (power > 0 ? 2 * current[power - 1] : 0) - previous[power];
        }

        return next;
    }
}
