using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Payloads;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Pipeline;

/// <summary>
/// Watches the clock of the device of one source. The offset of a message is its newest device time less its arrival. Once twenty messages have
/// shown where the offset lies (their median), a message is a leap
/// <list type="bullet">
/// <item>ahead, when its offset is higher than the median by more than the limit and it lies in the future;</item>
/// <item>back, when it and ten before it, over a minute or more, lie lower than the median by more than the limit, advance in step with the arrivals,
/// and began before times that were there already: a backlog goes on where the readings broke off, a clock that was set back repeats times.</item>
/// </list>
/// A higher offset that does not lie in the future is a clock that was put right, or a backlog that is done: the offset is learnt anew.
/// The median and the median absolute deviation are used because a delayed message must not move them: F. R. Hampel, J. Am. Stat. Assoc. 69
/// (1974) 383; that the median of n normal values scatters 1.2533 times as much as their mean: M. G. Kendall, A. Stuart, The Advanced Theory of Statistics 1.
/// </summary>
internal sealed class ClockWatch(ReadingTimeRule rule)
{
    private const int Window = 64;
    private const int Needed = 20;
    private const int LearnEvery = 16;
    private const int StepsInPace = 10;
    private const double MedianFactor = 1.2533;
    private const double DeviationFactor = 1.4826;
    private const double PaceTolerance = 0.2;
    private static readonly TimeSpan PaceFor = TimeSpan.FromMinutes(1);
    private static readonly TimeSpan PaceSlack = TimeSpan.FromSeconds(2);
    private readonly Lock _lock = new();
    private readonly long[] _offsets = new long[Window];
    private int _count;
    private int _next;
    private long _median;
    private int _inPace;
    private (Instant Device, Instant Arrival)? _paceFrom;
    private (Instant Device, Instant Arrival)? _last;
    private Instant _newest;
    private bool _repeats;
    private DeviceClockState _state = DeviceClockState.Learning;
    private long _leap;
    private Instant _since;

    /// <summary>Judges a message: false where its device's clock has leapt.</summary>
    public bool Admit(Instant device, Instant arrival)
    {
        lock (_lock)
        {
            DeviceClockState state = rule.LeapLimit is { } limit && _count >= Needed ? Judge(device, arrival, Microseconds(limit)) : DeviceClockState.Steady;
            bool keepsPace = KeepsPace(device, arrival);
            _last = (device, arrival);
            bool admitted = state == DeviceClockState.Steady;
            if (admitted && _inPace == 0)
            {
                _newest = device > _newest ? device : _newest;

                // A backlog tells nothing of the clock: it runs faster than time.
                if (keepsPace)
                {
                    Learn(device.Microseconds - arrival.Microseconds);
                }
            }

            DeviceClockState shown = admitted && _count < Needed ? DeviceClockState.Learning : state;
            if (shown != _state)
            {
                (_state, _since) = (shown, arrival);
            }

            _leap = admitted ? 0 : device.Microseconds - arrival.Microseconds - _median;
            return admitted;
        }
    }

    /// <summary>What is known now.</summary>
    public DeviceClock Describe()
    {
        lock (_lock)
        {
            long[] sorted = [.. _offsets.Take(_count).Order()];
            double median = sorted.Length == 0 ? double.NaN : Seconds(sorted[sorted.Length / 2]);
            double[] deviations = [.. sorted.Select(offset => Math.Abs(Seconds(offset) - median)).Order()];
            double uncertainty = deviations.Length < 3 ? double.NaN : MedianFactor * DeviationFactor * deviations[deviations.Length / 2] / Math.Sqrt(deviations.Length);
            return new DeviceClock(_state, median, uncertainty, sorted.Length == 0 ? double.NaN : Seconds(sorted[^1]), _count, Seconds(_leap), _since);
        }
    }

    private static long Microseconds(TimeSpan span) => span.Ticks / TimeSpan.TicksPerMicrosecond;

    private static double Seconds(long microseconds) => microseconds / (double)Instant.MicrosecondsPerSecond;

    private DeviceClockState Judge(Instant device, Instant arrival, long limit)
    {
        long offset = device.Microseconds - arrival.Microseconds;
        if (offset > _median + limit)
        {
            _inPace = 0;
            if (offset > Microseconds(rule.PermittedSkew))
            {
                return DeviceClockState.LeaptAhead;
            }

            _count = _next = 0;
            return DeviceClockState.Steady;
        }

        if (offset >= _median - limit)
        {
            _inPace = 0;
            return DeviceClockState.Steady;
        }

        return IsInPace(device, arrival) && _inPace > StepsInPace && _repeats && arrival - _paceFrom!.Value.Arrival >= PaceFor ? DeviceClockState.LeaptBack : DeviceClockState.Steady;
    }

    /// <summary>Counts messages that lie behind and advance in step with the arrivals.</summary>
    private bool IsInPace(Instant device, Instant arrival)
    {
        if (!KeepsPace(device, arrival))
        {
            _inPace = 0;
        }

        if (_inPace == 0)
        {
            _paceFrom = (device, arrival);
            _repeats = _newest - device > rule.LeapLimit;
        }

        _inPace++;
        return _inPace > 1;
    }

    private bool KeepsPace(Instant device, Instant arrival)
    {
        if (_last is not { } last)
        {
            return false;
        }

        long arrived = arrival.Microseconds - last.Arrival.Microseconds;
        long advanced = device.Microseconds - last.Device.Microseconds;
        return Math.Abs(advanced - arrived) <= Math.Max(Microseconds(PaceSlack), (long)(PaceTolerance * arrived));
    }

    private void Learn(long offset)
    {
        _offsets[_next] = offset;
        _next = (_next + 1) % Window;
        _count = Math.Min(Window, _count + 1);
        if (_count == Needed || _next % LearnEvery == 0)
        {
            Span<long> sorted = stackalloc long[Window];
            _offsets.AsSpan(0, _count).CopyTo(sorted);
            sorted = sorted[.._count];
            sorted.Sort();
            _median = sorted[_count / 2];
        }
    }
}
