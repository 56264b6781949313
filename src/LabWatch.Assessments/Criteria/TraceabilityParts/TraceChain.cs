using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Criteria.TraceabilityParts;

/// <summary>The chain of calibrations of a source at the end of a window.</summary>
/// <param name="Links">The links.</param>
/// <param name="Broken">Where it is broken, each as a clause.</param>
/// <param name="NominalCelsius">Set point that ranges are checked at; NaN where none is known or the source is not used at it.</param>
internal sealed record TraceChain(IReadOnlyList<TraceLink> Links, IReadOnlyList<string> Broken, double NominalCelsius)
{
    public static TraceChain Of(CriterionInput input)
    {
        Channel? channel = StabilityCriterion.SetPointChannel(input.Source);
        double setPoint = SetPointHistory.Of(channel is null ? null : input.Readings.Find(channel.Id)).Celsius;
        double tolerance = StabilityParts.StabilityObstacles.AtTemperatureKelvin(setPoint);
        bool isUsed = setPoint >= input.Source.MinimumCelsius - tolerance && setPoint <= input.Source.MaximumCelsius + tolerance;
        Walk walk = new(input.Snapshot, input.Source, new Instant(input.Window.End.Microseconds - 1), isUsed ? setPoint : double.NaN);
        walk.Run();
        return new(walk.Links, walk.Broken, walk.Nominal);
    }

    private sealed class Walk(LabSnapshot lab, ReferenceSource source, Instant at, double nominal)
    {
        public List<TraceLink> Links { get; } = [];

        public List<string> Broken { get; } = [];

        public double Nominal { get; } = nominal;

        public void Run()
        {
            bool isRadiometric = source.Route is TraceabilityRoute.Radiometric;
            if (source.ReferenceChannel is null && !source.Channels.Any(IsComparator))
            {
                Broken.Add("no thermometer is named that the temperature of this source is taken from");
            }

            foreach (Channel channel in source.Channels)
            {
                if (channel.Quantity is ChannelQuantity.WellThermometer)
                {
                    Follow(channel, rests: channel.IsReference || Certificate(channel) is not null, needed: channel.IsReference && !isRadiometric);
                }
                else if (IsComparator(channel))
                {
                    Follow(channel, isRadiometric, isRadiometric);
                }
            }
        }

        private static bool IsComparator(Channel channel) => channel.Quantity is ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal;

        private Certificate? Certificate(Channel channel) => lab.CertificateInForce(channel.Key, at);

        private void Follow(Channel channel, bool rests, bool needed)
        {
            if (Certificate(channel) is not { } certificate)
            {
                if (needed)
                {
                    Broken.Add(lab.StaysIn(channel.Key).Any(stay => stay.Covers(at)) ? $"no certificate is in force for {channel.Id}" : $"no instrument is on record in {channel.Id}");
                }

                return;
            }

            Add(certificate, channel, rests);
            TriplePoint(certificate, channel, rests);
            if (rests)
            {
                Range(certificate, channel);
                Against(certificate, channel);
                if (JunctionTemperatures.ChannelOf(source, channel) is { } junction && !Links.Any(link => link.Name.EndsWith(" " + junction.Id, StringComparison.Ordinal)))
                {
                    Follow(junction, rests: true, needed: true);
                }
            }
        }

        private void Add(Certificate certificate, Channel channel, bool rests) => Links.Add(new(
            $"certificate {certificate.Number} of {channel.Id}", certificate.Reference, Used(certificate.ValidFrom, certificate.DueAt - certificate.ValidFrom), Left(certificate.DueAt), rests));

        private void TriplePoint(Certificate certificate, Channel channel, bool rests)
        {
            if (certificate.Characteristic is SprtCharacteristic && lab.Instruments.FirstOrDefault(item => item.Id == certificate.Instrument)?.TriplePointInterval is { } interval)
            {
                Instant from = certificate.TriplePoint?.At ?? certificate.ValidFrom;
                Links.Add(new($"triple-point check of {channel.Id}", certificate.Reference, Used(from, interval), Left(from + interval), rests));
            }
        }

        private void Range(Certificate certificate, Channel channel)
        {
            bool isJunction = channel.Quantity is ChannelQuantity.ReferenceJunction;
            if (!isJunction && double.IsFinite(Nominal) && (Nominal < certificate.MinimumCelsius || Nominal > certificate.MaximumCelsius))
            {
                Broken.Add($"{VerdictText.Plain(Nominal)} degC is outside the range of certificate {certificate.Number} of {channel.Id} "
                    + $"({VerdictText.Plain(certificate.MinimumCelsius)} to {VerdictText.Plain(certificate.MaximumCelsius)} degC)");
            }
        }

        private void Against(Certificate certificate, Channel channel)
        {
            if (certificate.CalibratedAgainst is not { } key)
            {
                return;
            }

            if (key == source.Key)
            {
                Broken.Add($"{channel.Id} was calibrated against this very source: the chain ends in itself");
            }
            else if (lab.SourceInForce(key, certificate.ValidFrom)?.ReferenceChannel is not { } standard || lab.CertificateInForce(standard.Key, certificate.ValidFrom) is not { } of)
            {
                Broken.Add($"{channel.Id} was calibrated against {key.Source}, whose reference had no certificate in force at that time");
            }
            else if (of.DueAt <= certificate.ValidFrom)
            {
                Broken.Add($"{channel.Id} was calibrated against {key.Source} while certificate {of.Number} of its reference was overdue");
            }
        }

        private double Used(Instant from, TimeSpan? interval) => interval is { } length ? 100 * ((at - from) / length) : double.NaN;

        private double? Left(Instant? due) => due is { } end ? (end - at).TotalDays : null;
    }
}
