namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Reference function of a thermocouple type and its exact inverse (no approximate inverse polynomial), IEC 60584-1:2013 = NIST Monograph 175.
/// Emf in millivolt, reference junction at 0 degC, temperature in degree Celsius (t90). Safe to share; no method allocates.
/// </summary>
public sealed class ThermocoupleReference
{
    private const int Intervals = 128;

    /// <summary>Type B has no usable emf below this: its emf falls to -2.6 uV at 21 degC and rises again.</summary>
    private const double LowestInvertibleOfTypeB = 50;

    private static readonly ThermocoupleReference[] All = [.. Enum.GetValues<ThermocoupleType>().Select(type => new ThermocoupleReference(type))];

    private readonly ThermocoupleSegment[] _segments;
    private readonly double[] _emfAt = new double[Intervals + 1];
    private readonly double _step;

    private ThermocoupleReference(ThermocoupleType type)
    {
        Type = type;
        _segments = ThermocoupleCoefficients.Of(type);
        MinimumInvertibleCelsius = type == ThermocoupleType.B ? LowestInvertibleOfTypeB : MinimumCelsius;
        _step = (MaximumCelsius - MinimumInvertibleCelsius) / Intervals;
        for (int i = 0; i <= Intervals; i++)
        {
            _emfAt[i] = EmfMillivolt(MinimumInvertibleCelsius + (i * _step));
        }
    }

    /// <summary>The type.</summary>
    public ThermocoupleType Type { get; }

    /// <summary>Lowest temperature of the reference function, degree Celsius.</summary>
    public double MinimumCelsius => _segments[0].Minimum;

    /// <summary>Highest temperature of the reference function, degree Celsius.</summary>
    public double MaximumCelsius => _segments[^1].Maximum;

    /// <summary>Lowest temperature that an emf is turned into, degree Celsius.</summary>
    public double MinimumInvertibleCelsius { get; }

    /// <summary>The reference function of a type.</summary>
    public static ThermocoupleReference Of(ThermocoupleType type) => All[(int)type];

    /// <summary>Emf at a temperature, millivolt; outside the range the nearest segment goes on, and the caller judges.</summary>
    public double EmfMillivolt(double celsius) => SegmentAt(celsius).Emf(celsius);

    /// <summary>Seebeck coefficient dE/dt, millivolt per kelvin.</summary>
    public double SlopeMillivoltPerKelvin(double celsius) => SegmentAt(celsius).Slope(celsius);

    /// <summary>Step of the emf where two segments meet, millivolt: upper minus lower; 0 where none meet.</summary>
    public double StepMillivolt(double jointCelsius)
    {
        for (int i = 1; i < _segments.Length; i++)
        {
            if (_segments[i].Minimum == jointCelsius)
            {
                return _segments[i].Emf(jointCelsius) - _segments[i - 1].Emf(jointCelsius);
            }
        }

        return 0;
    }

    /// <summary>
    /// Temperature of an emf, degree Celsius, within 1e-9 K (1e-7 K near -270 degC, where the emf hardly changes); NaN outside the emf of <see cref="MinimumInvertibleCelsius"/> to <see cref="MaximumCelsius"/>.
    /// </summary>
    public double CelsiusOf(double emfMillivolt)
    {
        if (!(emfMillivolt >= _emfAt[0] && emfMillivolt <= _emfAt[Intervals]))
        {
            return double.NaN;
        }

        int below = IntervalOf(emfMillivolt);
        double low = MinimumInvertibleCelsius + (below * _step);
        double high = low + _step;
        double t = low + (_step * (emfMillivolt - _emfAt[below]) / (_emfAt[below + 1] - _emfAt[below]));
        for (int iteration = 0; iteration < 60; iteration++)
        {
            ThermocoupleSegment segment = SegmentAt(t);
            double error = segment.Emf(t) - emfMillivolt;
            (low, high) = error > 0 ? (low, t) : (t, high);
            double next = t - (error / segment.Slope(t));
            next = next >= low && next <= high ? next : 0.5 * (low + high);
            double change = Math.Abs(next - t);
            t = next;
            if (change < 1e-11 * (1 + Math.Abs(t)))
            {
                break;
            }
        }

        return t;
    }

    private ThermocoupleSegment SegmentAt(double celsius)
    {
        int i = 0;
        while (i < _segments.Length - 1 && celsius >= _segments[i].Maximum)
        {
            i++;
        }

        return _segments[i];
    }

    private int IntervalOf(double emf)
    {
        int low = 0;
        for (int half = Intervals / 2; half > 0; half /= 2)
        {
            low = _emfAt[low + half] <= emf ? low + half : low;
        }

        return low;
    }
}
