using LabWatch.Intake.Payloads;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Intake;

/// <summary>The examples of RFC 8428 section 5.1 (quoted from memory), decoded with channels of the names that they use.</summary>
public class SenmlExamplesTests
{
    private const ReadingQuality Late = ReadingQuality.Late;

    [Fact]
    public void Section_5_1_1_single_data_point()
    {
        DecodedMessage decoded = Decode(
            """[{"n":"urn:dev:ow:10e2073a01080063","u":"Cel","v":23.1}]""", IntakeLab.Channel("urn:dev:ow:10e2073a01080063", "Cel"));
        Assert.Equal(
            [new Reading("urn:dev:ow:10e2073a01080063", DecodingBench.Arrival, 23.1, ReadingQuality.StampedOnArrival)], decoded.Pack!.Readings);
        Assert.Empty(decoded.Findings);
    }

    [Fact]
    public void Section_5_1_2_multiple_data_points_without_time_are_of_now()
    {
        DecodedMessage decoded = Decode(
            """
            [
              {"bn":"urn:dev:ow:10e2073a01080063:","n":"voltage","u":"V","v":120.1},
              {"n":"current","u":"A","v":1.2}
            ]
            """,
            IntakeLab.Channel("urn:dev:ow:10e2073a01080063:voltage", "V"),
            IntakeLab.Channel("urn:dev:ow:10e2073a01080063:current", "A"));
        Assert.Equal(
            [
                new Reading("urn:dev:ow:10e2073a01080063:voltage", DecodingBench.Arrival, 120.1, ReadingQuality.StampedOnArrival),
                new Reading("urn:dev:ow:10e2073a01080063:current", DecodingBench.Arrival, 1.2, ReadingQuality.StampedOnArrival),
            ],
            decoded.Pack!.Readings);
    }

    [Fact]
    public void Section_5_1_2_base_time_base_unit_and_relative_times()
    {
        DecodedMessage decoded = Decode(
            """
            [
              {"bn":"urn:dev:ow:10e2073a0108006:","bt":1.276020076001e+09,
               "bu":"A","bver":5,
               "n":"voltage","u":"V","v":120.1},
              {"n":"current","t":-5,"v":1.2},
              {"n":"current","t":-4,"v":1.3},
              {"n":"current","t":-3,"v":1.4},
              {"n":"current","t":-2,"v":1.5},
              {"n":"current","t":-1,"v":1.6},
              {"n":"current","v":1.7}
            ]
            """,
            IntakeLab.Channel("urn:dev:ow:10e2073a0108006:voltage", "V"),
            IntakeLab.Channel("urn:dev:ow:10e2073a0108006:current", "A"));
        const long Base = 1_276_020_076_001_000;
        Reading[] expected =
        [
            new("urn:dev:ow:10e2073a0108006:voltage", new Instant(Base), 120.1, Late),
            .. new[] { (-5, 1.2), (-4, 1.3), (-3, 1.4), (-2, 1.5), (-1, 1.6), (0, 1.7) }
                .Select(row => new Reading("urn:dev:ow:10e2073a0108006:current", new Instant(Base + (row.Item1 * 1_000_000L)), row.Item2, Late)),
        ];
        Assert.Equal(expected, decoded.Pack!.Readings);
        Assert.Empty(decoded.Findings);
    }

    [Fact]
    public void Section_5_1_3_records_in_another_unit_are_refused_one_by_one()
    {
        DecodedMessage decoded = Decode(
            """
            [
              {"bn":"urn:dev:ow:10e2073a01080063","bt":1.320067464e+09,
               "bu":"%RH","v":20},
              {"u":"lon","v":24.30621},
              {"u":"lat","v":60.07965},
              {"t":60,"v":20.3}
            ]
            """,
            IntakeLab.Channel("urn:dev:ow:10e2073a01080063", "%RH"));
        Assert.Equal(
            [
                new Reading("urn:dev:ow:10e2073a01080063", new Instant(1_320_067_464_000_000), 20, Late),
                new Reading("urn:dev:ow:10e2073a01080063", new Instant(1_320_067_524_000_000), 20.3, Late),
            ],
            decoded.Pack!.Readings);
        Assert.Equal([IntakeCode.UnitMismatch, IntakeCode.UnitMismatch], decoded.Findings.Select(finding => finding.Code));
        Assert.Equal(["/1/u", "/2/u"], decoded.Findings.Select(finding => finding.Where));
    }

    [Fact]
    public void Section_5_1_5_multiple_data_types()
    {
        DecodedMessage decoded = Decode(
            """
            [
              {"bn":"urn:dev:ow:10e2073a01080063:","n":"temp","u":"Cel","v":23.1},
              {"n":"label","vs":"Machine Room"},
              {"n":"open","vb":false},
              {"n":"nfc-reader","vd":"aGkgCg"}
            ]
            """,
            IntakeLab.Channel("urn:dev:ow:10e2073a01080063:temp", "Cel"),
            IntakeLab.Channel("urn:dev:ow:10e2073a01080063:open", "/"));
        Assert.Equal([23.1, 0.0], decoded.Pack!.Readings.Select(reading => reading.Value));
        Assert.Equal([IntakeCode.ValueNotNumber, IntakeCode.ValueNotNumber], decoded.Findings.Select(finding => finding.Code));
        Assert.Equal(["/1/vs", "/3/vd"], decoded.Findings.Select(finding => finding.Where));
    }

    [Fact]
    public void Section_5_1_6_base_name_changes_within_a_pack()
    {
        DecodedMessage decoded = Decode(
            """
            [
              {"bn":"2001:db8::2/","bt":1.320078429e+09,
               "n":"temperature","u":"Cel","v":25.2},
              {"n":"humidity","u":"%RH","v":30},
              {"bn":"2001:db8::1/","n":"temperature","u":"Cel","v":12.3},
              {"n":"humidity","u":"%RH","v":67}
            ]
            """,
            IntakeLab.Channel("2001:db8::2/temperature", "Cel"),
            IntakeLab.Channel("2001:db8::2/humidity", "%RH"),
            IntakeLab.Channel("2001:db8::1/temperature", "Cel"),
            IntakeLab.Channel("2001:db8::1/humidity", "%RH"));
        var time = new Instant(1_320_078_429_000_000);
        Assert.Equal(
            [
                new Reading("2001:db8::2/temperature", time, 25.2, Late),
                new Reading("2001:db8::2/humidity", time, 30, Late),
                new Reading("2001:db8::1/temperature", time, 12.3, Late),
                new Reading("2001:db8::1/humidity", time, 67, Late),
            ],
            decoded.Pack!.Readings);
    }

    private static DecodedMessage Decode(string payload, params Channel[] channels) =>
        DecodingBench.Decode(payload, lab: new IntakeLab(channels));
}
