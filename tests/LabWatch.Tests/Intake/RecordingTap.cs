using System.Collections.Concurrent;
using LabWatch.Lab.Readings;

namespace LabWatch.Tests.Intake;

/// <summary>Keeps what it was shown.</summary>
internal sealed class RecordingTap : IReadingTap
{
    private readonly ConcurrentQueue<ReadingPack> _packs = new();

    public IReadOnlyList<double> Values => [.. _packs.SelectMany(pack => pack.Readings).Select(reading => reading.Value)];

    public void OnPack(ReadingPack pack) => _packs.Enqueue(pack);
}
