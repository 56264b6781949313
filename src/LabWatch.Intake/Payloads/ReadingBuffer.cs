using System.Buffers;
using LabWatch.Lab.Readings;

namespace LabWatch.Intake.Payloads;

/// <summary>Collects the readings of one message in a rented array, so that only the array that is kept is allocated.</summary>
internal ref struct ReadingBuffer
{
    private Reading[]? _rented;

    public int Count { get; private set; }

    public void Add(in Reading reading)
    {
        if (_rented is null || Count == _rented.Length)
        {
            Grow();
        }

        _rented![Count++] = reading;
    }

    /// <summary>Forgets what was collected: the message as a whole is refused.</summary>
    public void Clear() => Count = 0;

    public readonly Reading[] ToArray() => Count == 0 ? [] : _rented.AsSpan(0, Count).ToArray();

    public void Dispose()
    {
        if (_rented is { } rented)
        {
            ArrayPool<Reading>.Shared.Return(rented);
            _rented = null;
        }
    }

    private void Grow()
    {
        Reading[] larger = ArrayPool<Reading>.Shared.Rent(Math.Max(64, Count * 2));
        _rented.AsSpan(0, Count).CopyTo(larger);
        Dispose();
        _rented = larger;
    }
}
