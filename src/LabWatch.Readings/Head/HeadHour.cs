namespace LabWatch.Readings.Head;

/// <summary>
/// A source-hour that has readings in memory, or was looked at lately: the open part, the part that is being sealed, and what is
/// sealed already as far as identities need it.
/// </summary>
internal sealed class HeadHour(HeadSource source, long hour)
{
    private long[] _earlierLast = [];

    public HeadSource Source { get; } = source;

    /// <summary>Start of the hour, microseconds since 1970 UTC.</summary>
    public long Hour { get; } = hour;

    /// <summary>Parts sealed so far; the next part takes this number.</summary>
    public int SealedParts { get; private set; }

    /// <summary>What is sealed; null where nothing is, or where it has to be loaded again.</summary>
    public SealedIdentity? Sealed { get; private set; }

    /// <summary>Whether <see cref="SealedParts"/> and <see cref="Sealed"/> are those of the database.</summary>
    public bool IsLoaded { get; private set; }

    public HeadPart? Open { get; private set; }

    /// <summary>The part that the sealer holds; it takes no readings.</summary>
    public HeadPart? Frozen { get; private set; }

    /// <summary>Whether there is nothing here that the database does not have.</summary>
    public bool IsIdle => Frozen is null && Open is not { Readings: > 0 };

    /// <summary>Takes over what the database says about the hour.</summary>
    public void Load(int sealedParts, SealedIdentity? identity)
    {
        SealedParts = sealedParts;
        Sealed = identity;
        IsLoaded = true;
        RefreshEarlier();
    }

    /// <summary>Says how many parts are sealed, without opening them yet.</summary>
    public void Recover(int sealedParts) => SealedParts = sealedParts;

    /// <summary>The part that takes readings, made where there is none.</summary>
    public HeadPart OpenPart() => Open ??= new HeadPart(SealedParts + (Frozen is null ? 0 : 1));

    /// <summary>Hands the open part to the sealer.</summary>
    public HeadPart Freeze()
    {
        Frozen = Open;
        Open = null;
        RefreshEarlier();
        return Frozen!;
    }

    /// <summary>Notes that the frozen part is in the database now.</summary>
    public void OnSealed()
    {
        Frozen = null;
        SealedParts++;
        Sealed = null;
        IsLoaded = false;
    }

    /// <summary>The value stored for an identity, wherever it lies.</summary>
    public bool TryFind(HeadChannel channel, HeadColumn? column, long time, out double value)
    {
        if (column is not null && column.TryFind(time, out value))
        {
            return true;
        }

        value = 0;
        if (_earlierLast.Length == 0 || time > EarlierLast(channel))
        {
            return false;
        }

        return (Frozen?.Find(channel.Number) is { } frozen && frozen.TryFind(time, out value))
            || (Sealed is not null && Sealed.TryFind(channel.Name, time, out value));
    }

    private long EarlierLast(HeadChannel channel)
    {
        if (channel.Number >= _earlierLast.Length)
        {
            int from = _earlierLast.Length;
            Array.Resize(ref _earlierLast, Math.Max(from * 2, channel.Number + 1));
            _earlierLast.AsSpan(from).Fill(long.MaxValue);
        }

        ref long last = ref _earlierLast[channel.Number];
        if (last == long.MaxValue)
        {
            last = Math.Max(Frozen?.Find(channel.Number)?.Last ?? long.MinValue, Sealed?.Last(channel.Name) ?? long.MinValue);
        }

        return last;
    }

    private void RefreshEarlier()
    {
        _earlierLast = Frozen is null && Sealed is null ? [] : new long[16];
        _earlierLast.AsSpan().Fill(long.MaxValue);
    }
}
