using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Service.Api.Sources;

/// <summary>The reference junctions of a thermocouple in each bucket of a reduced series: the mean of the channel that measures them in the same bucket.</summary>
internal sealed class BucketJunctions
{
    private readonly Estimate _kept;
    private readonly Dictionary<Instant, Estimate>? _measured;

    private BucketJunctions(Estimate kept, Dictionary<Instant, Estimate>? measured) => (_kept, _measured) = (kept, measured);

    /// <summary>Reads them; null where the description of the channel says nothing of them.</summary>
    public static async ValueTask<BucketJunctions?> ReadAsync(
        LabSnapshot lab, ReferenceSource source, Channel channel, TimeWindow window, TimeSpan bucket, IReadingStore store, CancellationToken cancellationToken)
    {
        if (channel.ReferenceJunction is not { } junction)
        {
            return null;
        }

        if (JunctionTemperatures.ChannelOf(source, channel) is not { } measured)
        {
            return new(junction.Channel is null ? junction.Celsius : Estimate.None, null);
        }

        IReadOnlyList<ReadingSummary> rows = await store.ReduceAsync(measured.Key, window, bucket, cancellationToken).ConfigureAwait(false);
        CertificateLookup certificates = new(lab, measured);
        Dictionary<Instant, Estimate> found = [];
        foreach (ReadingSummary row in rows)
        {
            double celsius = Celsius(certificates.At(row.Start), measured, row.Mean);
            found[row.Start] = double.IsFinite(celsius) ? new(celsius + junction.Celsius.Value, junction.Celsius.StandardUncertainty) : Estimate.None;
        }

        return new(Estimate.None, found);
    }

    /// <summary>The junctions in a bucket; none where nothing was heard of them in it.</summary>
    public Estimate At(Instant bucket) => _measured is null ? _kept : _measured.GetValueOrDefault(bucket, Estimate.None);

    private static double Celsius(Certificate? certificate, Channel channel, double raw) => certificate is null
        ? string.Equals(channel.Unit, "Cel", StringComparison.Ordinal) ? raw : double.NaN
        : CertificateEvaluation.Evaluate(certificate, raw, channel.Unit) is { HasValue: true } evaluation ? evaluation.Celsius.Value : double.NaN;
}
