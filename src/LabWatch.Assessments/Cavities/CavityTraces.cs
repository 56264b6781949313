using System.Collections.Concurrent;
using LabWatch.Metrology.Cavities;
using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments.Cavities;

/// <summary>
/// Traces, each made once and kept in memory and, where there is a folder, on disk by the digest of what it depends on. A file that is
/// missing, damaged or foreign is traced again; one that cannot be written is only logged. Safe for many threads.
/// </summary>
/// <param name="folder">Folder of the kept traces; null for none.</param>
/// <param name="logger">Log.</param>
internal sealed class CavityTraces(string? folder, ILogger<CavityTraces> logger)
{
    private readonly ConcurrentDictionary<CavityTraceKey, Lazy<HitCounts>> _counts = new();

    /// <summary>
    /// Options of every trace; they belong to the program version that provenance names. 16 randomisations of 256 rays leave a standard
    /// error of some 1e-6 of e_eff for the cavities in use; after 24 reflections walls of e = 0.6 keep 3e-10. Half of the processors.
    /// </summary>
    public static MonteCarloOptions Options { get; } = new(256, 16, 24, 20_260_301, Math.Max(1, Environment.ProcessorCount / 2));

    /// <summary>Number of traces that were computed, not read.</summary>
    public int Computed => _computed;

    private int _computed;

    /// <summary>The counts of a key.</summary>
    /// <exception cref="ArgumentException">Geometry or view is impossible.</exception>
    public HitCounts Of(CavityTraceKey key) => _counts.GetOrAdd(key, static (wanted, self) => new(() => self.ReadOrTrace(wanted)), this).Value;

    private HitCounts ReadOrTrace(CavityTraceKey key)
    {
        string? path = folder is null || key.Geometry.Form == CavityForm.FlatPlate ? null : Path.Combine(folder, key.Digest(Options) + ".hits");
        if (path is not null && Read(path, key) is { } kept)
        {
            return kept;
        }

        Interlocked.Increment(ref _computed);
        HitCounts counts = CavityTrace.Run(key.Geometry, key.View, key.DiffuseFraction, null, key.Second, Options);
        if (path is not null)
        {
            Keep(path, counts);
        }

        return counts;
    }

    private HitCounts? Read(string path, CavityTraceKey key)
    {
        try
        {
            if (!File.Exists(path))
            {
                return null;
            }

            HitCounts? counts = HitCountsFormat.Read(File.ReadAllBytes(path), key.Geometry);
            if (counts is not null && counts.DiffuseFraction == key.DiffuseFraction && counts.Second == key.Second)
            {
                return counts;
            }

            AssessmentsLog.TraceDamaged(logger, path);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            AssessmentsLog.TraceNotKept(logger, path, exception.Message);
        }

        return null;
    }

    private void Keep(string path, HitCounts counts)
    {
        string draft = $"{path}.{Guid.NewGuid():N}.tmp";
        try
        {
            Directory.CreateDirectory(folder!);
            File.WriteAllBytes(draft, HitCountsFormat.Write(counts));
            File.Move(draft, path, overwrite: true);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            AssessmentsLog.TraceNotKept(logger, path, exception.Message);
        }
    }
}
