using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.PurgeParts;

/// <summary>Makes moments of five minutes out of readings.</summary>
internal sealed class PurgeReader(CriterionInput input, TimeWindow span)
{
    /// <summary>Standard uncertainty of a wall or dew-point sensor without a certificate, kelvin.</summary>
    private const double UncalibratedKelvin = 1;
    private const double HumidityPercent = 2;
    private const double LitrePerSecond = 60;

    public static readonly TimeSpan Block = TimeSpan.FromMinutes(5);

    /// <summary>The moments, one after the other; null for those in which no wall has a temperature.</summary>
    public IReadOnlyList<PurgeMoment?> Read()
    {
        List<(Channel Channel, BlockMeans Blocks)> walls = [.. Of(ChannelQuantity.WellThermometer).Concat(Of(ChannelQuantity.ApertureLip)).Where(wall => wall.Blocks.HasValue)];
        (Channel Channel, BlockMeans Blocks)? dew = First(ChannelQuantity.DewPoint), flow = First(ChannelQuantity.PurgeFlow);
        (Channel Channel, BlockMeans Blocks)? air = First(ChannelQuantity.AmbientTemperature), humidity = First(ChannelQuantity.RelativeHumidity);
        double perMinute = flow?.Channel.Unit == "l/s" ? LitrePerSecond : 1;
        List<PurgeMoment?> moments = [];
        for (int i = 0; i < (int)(span.Duration / Block); i++)
        {
            List<(Channel Channel, BlockMeans Blocks)> known = [.. walls.Where(wall => double.IsFinite(wall.Blocks.Means[i]))];
            if (known.Count == 0)
            {
                moments.Add(null);
                continue;
            }

            (Channel coldest, BlockMeans blocks) = known.MinBy(wall => wall.Blocks.Means[i]);
            double litres = flow is { } measured ? measured.Blocks.Means[i] * perMinute : double.NaN;
            (Estimate gas, string from) = Gas(dew, litres, air, humidity, i);
            moments.Add(new(new(blocks.Means[i], Certain(blocks.Calibration, UncalibratedKelvin)), coldest.Id, known.Max(wall => wall.Blocks.Means[i]), gas, from, litres));
        }

        return moments;
    }

    private (Estimate Gas, string From) Gas(
        (Channel Channel, BlockMeans Blocks)? dew, double litres, (Channel Channel, BlockMeans Blocks)? air, (Channel Channel, BlockMeans Blocks)? humidity, int block)
    {
        if (dew is { } sensor)
        {
            double celsius = sensor.Blocks.Means[block];
            return (double.IsFinite(celsius) ? new(celsius, Certain(sensor.Blocks.Calibration, UncalibratedKelvin)) : Estimate.None, sensor.Channel.Id);
        }

        if (input.Source.Purge is { DewPointCelsius: { } held } purge && litres >= purge.MinimumFlowLitrePerMinute)
        {
            return (new(held, UncalibratedKelvin), "the qualified flow");
        }

        if (air is not { } warm || humidity is not { } moist || !double.IsFinite(warm.Blocks.Means[block]) || !(moist.Blocks.Means[block] > 0))
        {
            return (Estimate.None, "nothing");
        }

        Estimate room = new(warm.Blocks.Means[block], Certain(warm.Blocks.Calibration, SurroundingsPoint.UncalibratedKelvin));
        Estimate percent = new(moist.Blocks.Means[block], HumidityPercent);
        Estimate dewPoint = Humidity.DewPoint(room, percent);
        return (dewPoint.Value < 0 ? Humidity.FrostPoint(room, percent) : dewPoint, "the air of the room");
    }

    private static double Certain(double calibration, double otherwise) => double.IsFinite(calibration) ? calibration : otherwise;

    private (Channel Channel, BlockMeans Blocks)? First(ChannelQuantity quantity) => Of(quantity) is [var first, ..] ? first : null;

    private List<(Channel Channel, BlockMeans Blocks)> Of(ChannelQuantity quantity) =>
        [.. input.Source.Channels.Where(channel => channel.Quantity == quantity).Select(channel => (channel, BlockMeans.Of(input.Snapshot, channel, span, Block, input.Readings)))];
}
