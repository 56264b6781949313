using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments;

/// <summary>One invented block furnace at the invented site, and the readings it might give.</summary>
internal static class TestLab
{
    public const string Well = "well-1";

    public const string SetPoint = "set-point";

    public static readonly SourceKey Rowan = new("hollin-vale", "rowan");

    /// <summary>2026-12-01T12:00:00Z.</summary>
    public static readonly Instant Noon = Instant.FromUnixSeconds(1_796_126_400);

    public static readonly Instant LongAgo = Noon - TimeSpan.FromDays(90);

    public static Certificate IndicatorCertificate { get; } = new(
        "cal-well", 1, "ind-1", "HV-2026-11", "invented", LongAgo, Noon + TimeSpan.FromDays(200), 100, 500,
        new CorrectionTableCharacteristic(0.03, 2, [new CorrectionPoint(100, 0), new CorrectionPoint(500, 0)]));

    public static Certificate ResistanceCertificate { get; } = IndicatorCertificate with
    {
        Id = "cal-prt",
        Characteristic = new CallendarVanDusenCharacteristic(0.03, 2, 100, 3.9083e-3, -5.775e-7, -4.183e-12),
    };

    public static AcceptanceLimit Limit { get; } = new(
        "rowan-stability", 1, Rowan, CriterionCode.Stability, 50, "mK", DecisionRule.GuardBand, LongAgo);

    public static LabSnapshot Snapshot(
        IReadOnlyList<Certificate>? certificates = null, IReadOnlyList<AcceptanceLimit>? limits = null, string unit = "Cel", TimeSpan? interval = null, bool withSetPoint = true)
    {
        Channel well = new(new(Rowan, Well), "Well 1", ChannelQuantity.WellThermometer, unit, interval ?? TimeSpan.FromSeconds(10)) { IsReference = true };
        Channel setPoint = new(new(Rowan, SetPoint), "Set point", ChannelQuantity.SetPoint, "Cel", TimeSpan.FromSeconds(10));
        Channel heater = new(new(Rowan, "heater"), "Heater", ChannelQuantity.HeaterPower, "W", TimeSpan.FromSeconds(10));
        ReferenceSource rowan = new(
            Rowan, "Rowan", SourceKind.BlockFurnace, TraceabilityRoute.Contact, 100, 500, new Cavity(CavityShape.Cylinder, 20, 200, null, 20, []), [],
            withSetPoint ? [well, setPoint, heater] : [well, heater]);
        return new(
            new LabSite("hollin-vale", "Hollin Vale", "Europe/Dublin"),
            [rowan],
            [new Instrument("ind-1", "0042", "indicating thermometer")],
            [new Installation("ind-1", well.Key, LongAgo, null)],
            certificates ?? [IndicatorCertificate],
            limits ?? [Limit],
            []);
    }

    /// <summary>Readings of the well each 10 s from one instant to another.</summary>
    public static IEnumerable<Reading> WellReadings(Instant from, Instant until, Func<Instant, double> celsius, int everySeconds = 10)
    {
        for (Instant time = from; time < until; time += TimeSpan.FromSeconds(everySeconds))
        {
            yield return new Reading(Well, time, celsius(time));
        }
    }

    /// <summary>Readings of the set point each minute.</summary>
    public static IEnumerable<Reading> SetPoints(Instant from, Instant until, Func<Instant, double> celsius)
    {
        for (Instant time = from; time < until; time += TimeSpan.FromMinutes(1))
        {
            yield return new Reading(SetPoint, time, celsius(time));
        }
    }

    /// <summary>A steady source at 300 degC: noise of about 2 mK that depends on the time alone.</summary>
    public static double Steady(Instant time) => 300 + (0.004 * Noise(time));

    /// <summary>Reproducible noise, -0.5 to 0.5.</summary>
    public static double Noise(Instant time)
    {
        unchecked
        {
            ulong bits = (ulong)time.Microseconds * 0x9E37_79B9_7F4A_7C15;
            bits = (bits ^ (bits >> 29)) * 0xBF58_476D_1CE4_E5B9;
            return ((bits >> 11) * (1.0 / (1UL << 53))) - 0.5;
        }
    }

    /// <summary>Well and set point of a source over a span; steady at 300 degC unless stated.</summary>
    public static IEnumerable<Reading> Run(Instant from, Instant until, Func<Instant, double>? celsius = null, Func<Instant, double>? setPoint = null) =>
        WellReadings(from, until, celsius ?? Steady).Concat(SetPoints(from, until, setPoint ?? (_ => 300)));
}
