namespace LabWatch.Metrology.Hazards;

/// <summary>
/// Running energy balance of a heated source as one lump, C dT/dt = P - G (T - Ta) (lumped capacitance with a heat source: Incropera and others,
/// Fundamentals of Heat and Mass Transfer, 6th ed., section 5.3). Holds the latest stretch of time in a ring of fixed size; adding
/// allocates nothing. Not thread-safe.
/// </summary>
/// <param name="capacity">Heat capacity C, J/K; NaN where not known.</param>
/// <param name="loss">Loss G to the room, W/K; NaN where not known.</param>
/// <param name="reach">Longest span that is asked for, seconds.</param>
public sealed class HeatBalance(double capacity, double loss, double reach)
{
    private const int Places = 40;
    private const double PlacesInReach = 32;

    private readonly Place[] _ring = new Place[Places];
    private int _count;
    private int _next;
    private Place _last;
    private double _watt;
    private double _ambient;

    /// <summary>Whether capacity and loss are known.</summary>
    public bool IsBalanced => double.IsFinite(capacity) && double.IsFinite(loss);

    /// <summary>Adds a reading. A time that is not later than the last one is passed over; a gap longer than a tenth of the reach begins anew.</summary>
    /// <param name="seconds">Time, seconds, on any monotonic scale.</param>
    /// <param name="celsius">Temperature, degree Celsius.</param>
    /// <param name="watt">Power of the heater, watt.</param>
    /// <param name="ambientCelsius">Temperature of the room, degree Celsius.</param>
    /// <param name="setPointCelsius">Set point, degree Celsius; NaN where not known.</param>
    public void Add(double seconds, double celsius, double watt, double ambientCelsius, double setPointCelsius)
    {
        double step = seconds - _last.Seconds;
        if (_count > 0 && !(step > 0))
        {
            return;
        }

        if (_count == 0 || step > reach / 10)
        {
            _count = 0;
            _last = new Place(seconds, celsius, 0, 0, celsius - setPointCelsius);
            Keep(_last);
        }
        else
        {
            // Trapezoids: power and temperature change little between readings.
            double energy = 0.5 * (_watt + watt) * step;
            double lost = loss * 0.5 * (_last.Celsius - _ambient + celsius - ambientCelsius) * step;
            _last = new Place(seconds, celsius, _last.Energy + energy, _last.Net + energy - lost, celsius - setPointCelsius);
            if (seconds - _ring[(_next + Places - 1) % Places].Seconds >= reach / PlacesInReach)
            {
                Keep(_last);
            }
        }

        _watt = watt;
        _ambient = ambientCelsius;
    }

    /// <summary>The latest span of at least a length; null where it is not held yet.</summary>
    /// <param name="seconds">Length, at most the reach.</param>
    public HeatSpan? Over(double seconds)
    {
        double least = _last.Excess;
        for (int back = 1; back <= _count; back++)
        {
            Place place = _ring[(_next + Places - back) % Places];
            least = double.IsNaN(place.Excess) ? double.NaN : Math.Min(least, place.Excess);
            double length = _last.Seconds - place.Seconds;
            if (length >= seconds)
            {
                double measured = _last.Celsius - place.Celsius;
                double energy = _last.Energy - place.Energy;
                double expected = (_last.Net - place.Net) / capacity;
                return new HeatSpan(length, measured, expected, energy / length, (expected - measured) * capacity / energy, least);
            }
        }

        return null;
    }

    private void Keep(Place place)
    {
        _ring[_next] = place;
        _next = (_next + 1) % Places;
        _count = Math.Min(_count + 1, Places);
    }

    private readonly record struct Place(double Seconds, double Celsius, double Energy, double Net, double Excess);
}
