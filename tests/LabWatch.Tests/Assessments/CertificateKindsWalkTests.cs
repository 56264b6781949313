using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Readiness;
using LabWatch.Lab;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;
using LabWatch.Service.Calc;
using LabWatch.Tests.Lab;

namespace LabWatch.Tests.Assessments;

/// <summary>
/// One source for each kind of certificate, all the way: lab file, temperature, criterion, readiness, page, and the same number by <c>labwatch calc</c>.
/// </summary>
public sealed class CertificateKindsWalkTests
{
    private static readonly TimeWindow Window = new(TestLab.Noon, TestLab.Noon + TimeSpan.FromMinutes(30));
    private static readonly TimeWindow Span = StabilityCriterion.DefaultSchedule.SpanOf(Window);
    private static readonly StabilityCriterion Criterion = new(StabilityCriterion.DefaultSchedule);

    private const string CvdPt100 = """{ "kind": "callendar-van-dusen", "expandedUncertaintyKelvin": 0.02, "coverageFactor": 2, "r0Ohm": 100, "a": 3.9083e-3, "b": -5.775e-7, "c": -4.183e-12 }""";
    private const string SprtZinc = """{ "kind": "sprt", "expandedUncertaintyKelvin": 0.004, "coverageFactor": 2, "triplePointOhm": 25, "above": { "subrange": "water-to-zinc", "a": 0, "b": 0 } }""";
    private const string TypeK = """{ "kind": "thermocouple", "expandedUncertaintyKelvin": 1, "coverageFactor": 2, "type": "K" }""";
    private const string Table = """{ "kind": "correction-table", "expandedUncertaintyKelvin": 0.1, "coverageFactor": 2, "points": [ { "indicatedCelsius": 0, "correctionKelvin": 0 }, { "indicatedCelsius": 100, "correctionKelvin": 0.2 } ] }""";
    private const string Polynomial = """{ "kind": "polynomial", "rawUnit": "Ohm", "expandedUncertaintyKelvin": 0.2, "coverageFactor": 2, "rawMinimum": 0, "rawMaximum": 10, "coefficients": [1, 10, 0.5] }""";
    private const string SakumaHattori = """{ "kind": "sakuma-hattori", "rawUnit": "mV", "expandedUncertaintyKelvin": 0.5, "coverageFactor": 2, "aMicrometre": 9.5, "bMicrometreKelvin": 250, "c": 1 }""";

    /// <summary>Unit, raw value, certificate, temperature by an outside source with its tolerance, and the input of calc.</summary>
    public static TheoryData<string, double, string, double, double, string, string> Kinds { get; } = new()
    {
        // IEC 60751:2022, clause 4.2 (table of resistances): 138.5055 ohm at 100 degC.
        { "Ohm", 138.5055, CvdPt100, 100, 1e-4, "prt-cvd", """{ "r_ohm": 138.5055, "u_cal_k": 0.01 }""" },
        // Preston-Thomas 1990, table 1: Wr(gallium point, 29.7646 degC) = 1.11813889; R(TPW) 25 ohm and no deviation.
        { "Ohm", 25 * 1.11813889, SprtZinc, 29.7646, 2e-5, "prt-its90", """{ "r_ohm": 27.95347225, "r_tpw_ohm": 25, "above": { "subrange": "water-to-zinc", "a": 0 }, "u_cal_k": 0.002 }""" },
        // IEC 60584-1:2013, type K: 3.267 mV at 80 degC and 1.000 mV at 25 degC against 0 degC, each rounded to 0.001 mV (0.012 K each).
        { "mV", 3.267 - 1.000, TypeK, 80, 0.025, "thermocouple", """{ "type": "K", "emf_mv": 2.267, "t_ref_c": 25, "u_t_ref_k": 0.2, "u_cal_k": 0.5 }""" },
        // Linear between two points, by hand: 50 + 0.1.
        { "Cel", 50, Table, 50.1, 1e-9, "indicated-temperature", """{ "indicated": 50, "points": [ { "indicated_c": 0, "correction_k": 0 }, { "indicated_c": 100, "correction_k": 0.2 } ], "u_cal_k": 0.05 }""" },
        // By hand: 1 + 50 + 12.5.
        { "Ohm", 5, Polynomial, 63.5, 1e-9, "indicated-temperature", """{ "indicated": 5, "coefficients": [1, 10, 0.5], "u_cal_k": 0.1 }""" },
        // By hand: T = (c2/ln(C/S + 1) - B)/A with c2 = 14388 um K: 14388/ln(51) = 3659.369 um K, less 250 um K, over 9.5 um: 358.881 K.
        { "mV", 0.02, SakumaHattori, 85.731, 0.001, "radiation-thermometer", """{ "a_um": 9.5, "b_um_k": 250, "c": 1, "signal": 0.02, "u_cal_k": 0.25 }""" },
    };

    [Theory]
    [MemberData(nameof(Kinds))]
    public void A_certificate_of_each_kind_gives_one_temperature_everywhere(
        string unit, double raw, string characteristic, double celsius, double tolerance, string calculator, string calcInput)
    {
        LabSnapshot lab = Lab(unit, characteristic, """{ "channel": "junction" }""");
        ReferenceSource source = lab.Sources[0];
        FakeReadingStore store = Filled(raw, celsius, Span);

        CriterionResult result = Criterion.Evaluate(new(lab, source, Window, store.Read(source.Key, Criterion.Channels(source), Span)))[0];
        Estimate mean = result.Figures.Single(figure => figure.Name == FigureName.Mean).Value;

        Assert.Equal(celsius, mean.Value, tolerance);
        Assert.Equal(Decision.Pass, result.Decision);
        (double calculated, double u) = Calculate(calculator, calcInput);
        Assert.Equal(calculated, mean.Value, 1e-9);

        Dictionary<string, Reading> newest = Newest(raw, celsius);
        TemperatureView page = Temperatures.Of(lab, source, source.ReferenceChannel!, newest)!;
        Assert.Equal(calculated, page.Celsius, 1e-9);
        Assert.Equal(u, page.ExpandedUncertaintyKelvin!.Value / page.CoverageFactor!.Value, 1e-9);
        Assert.True(page.InsideCertificateRange);

        SourceReadiness readiness = ReadinessEvaluator.Evaluate(new(lab, source, [.. newest.Values], [], [], Window.End));
        Assert.NotEqual(ReadinessState.Unknown, readiness.State);
    }

    [Fact]
    public void Each_reading_of_a_thermocouple_takes_the_junction_of_its_own_time()
    {
        LabSnapshot lab = Lab("mV", TypeK, """{ "channel": "junction" }""");
        ReferenceSource source = lab.Sources[0];
        FakeReadingStore store = new();
        // IEC 60584-1:2013, type K against 0 degC: 3.267 mV at 80 degC; 0.798 mV at 20 degC and 1.000 mV at 25 degC. The junctions warm by 5 K halfway, and the source stays.
        Instant warm = Window.Start + TimeSpan.FromMinutes(15);
        store.Add(source.Key, TestLab.WellReadings(Span.Start, Span.End, time => 3.267 - (time < warm ? 0.798 : 1.000)));
        store.Add(source.Key, Junctions(Span, time => time < warm ? 20 : 25));
        store.Add(source.Key, TestLab.SetPoints(Span.Start, Span.End, _ => 80));

        CriterionResult result = Criterion.Evaluate(new(lab, source, Window, store.Read(source.Key, Criterion.Channels(source), Span)))[0];

        // Half of what rounding of the table leaves between the two halves; without the junctions it would be 2.5 K.
        Assert.InRange(result.Value.Value, 0, 15);
        Assert.Contains("junction", Criterion.Channels(source));
    }

    [Fact]
    public void A_stale_junction_gives_no_temperature_and_is_named()
    {
        LabSnapshot lab = Lab("mV", TypeK, """{ "channel": "junction" }""");
        ReferenceSource source = lab.Sources[0];
        FakeReadingStore store = new();
        store.Add(source.Key, TestLab.WellReadings(Span.Start, Span.End, _ => 2.267));
        store.Add(source.Key, Junctions(new(Span.Start, Window.Start + TimeSpan.FromMinutes(10)), _ => 25));
        store.Add(source.Key, TestLab.SetPoints(Span.Start, Span.End, _ => 80));

        CriterionResult result = Criterion.Evaluate(new(lab, source, Window, store.Read(source.Key, Criterion.Channels(source), Span)))[0];

        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Contains("readings of well-1 have no temperature, because junction, which measures its reference junctions, had no fresh reading", result.Explanation, StringComparison.Ordinal);
        Reading[] newest = [.. Newest(2.267, 80).Values.Where(reading => reading.Channel != "junction")];
        SourceReadiness readiness = ReadinessEvaluator.Evaluate(new(lab, source, newest, [], [], Window.End));
        Assert.Equal(ReadinessState.Unknown, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Text.Contains("its reference junctions, has no fresh reading", StringComparison.Ordinal));
        Assert.Null(Temperatures.Of(lab, source, source.ReferenceChannel!, newest.ToDictionary(reading => reading.Channel)));
    }

    [Fact]
    public void A_junction_kept_at_a_temperature_needs_no_channel_and_carries_its_uncertainty()
    {
        LabSnapshot lab = Lab("mV", TypeK, """{ "celsius": 25, "standardUncertaintyKelvin": 0.3 }""");
        TemperatureView page = Temperatures.Of(lab, lab.Sources[0], lab.Sources[0].ReferenceChannel!, Newest(2.267, 80))!;
        (double celsius, double u) = Calculate("thermocouple", """{ "type": "K", "emf_mv": 2.267, "t_ref_c": 25, "u_t_ref_k": 0.3, "u_cal_k": 0.5 }""");
        Assert.Equal(celsius, page.Celsius, 1e-9);
        Assert.Equal(2 * u, page.ExpandedUncertaintyKelvin!.Value, 1e-9);
    }

    [Theory]
    [InlineData("""{ "channel": "nowhere" }""", "reference-junction", "/channel")]
    [InlineData("""{ "channel": "junction", "celsius": 20 }""", "contradiction", "/celsius")]
    [InlineData("""{ }""", "missing", "/celsius")]
    public void A_wrong_link_is_a_finding(string junction, string code, string member) => Assert.Contains(
        Read("mV", TypeK, junction).Findings, finding => finding.Code == code && finding.Where == "/sources/0/channels/0/referenceJunction" + member);

    private static (double Celsius, double U) Calculate(string name, string input)
    {
        using StringReader reader = new(input);
        using StringWriter writer = new();
        Assert.Equal(0, CalcRunner.RunWhole(Calculators.All.Single(calculator => calculator.Name == name), reader, writer, explain: false));
        JsonNode answer = JsonNode.Parse(writer.ToString())!;
        return (answer["t_c"]!.GetValue<double>(), answer["u_t_k"]!.GetValue<double>());
    }

    private static FakeReadingStore Filled(double raw, double celsius, TimeWindow span)
    {
        FakeReadingStore store = new();
        store.Add(new("sample", "fir"), TestLab.WellReadings(span.Start, span.End, _ => raw));
        store.Add(new("sample", "fir"), Junctions(span, _ => 25));
        store.Add(new("sample", "fir"), TestLab.SetPoints(span.Start, span.End, _ => celsius));
        return store;
    }

    private static IEnumerable<Reading> Junctions(TimeWindow span, Func<Instant, double> celsius) =>
        TestLab.WellReadings(span.Start, span.End, celsius).Select(reading => reading with { Channel = "junction" });

    private static Dictionary<string, Reading> Newest(double raw, double celsius) => new(StringComparer.Ordinal)
    {
        ["well-1"] = new("well-1", Window.End, raw),
        ["junction"] = new("junction", Window.End - TimeSpan.FromSeconds(2), 25),
        ["set-point"] = new("set-point", Window.End, celsius),
    };

    private static LabSnapshot Lab(string unit, string characteristic, string junction)
    {
        LabFileResult result = Read(unit, characteristic, junction);
        Assert.Empty(result.Findings);
        return result.Snapshot!;
    }

    private static LabFileResult Read(string unit, string characteristic, string junction)
    {
        JsonNode file = JsonNode.Parse(LabFileSample.Text, documentOptions: new JsonDocumentOptions { AllowTrailingCommas = true, CommentHandling = JsonCommentHandling.Skip })!;
        JsonArray channels = file["sources"]![0]!["channels"]!.AsArray();
        channels[0]!["unit"] = unit;
        channels[0]!["intervalSeconds"] = 10;
        if (unit == "mV" && !characteristic.Contains("sakuma", StringComparison.Ordinal))
        {
            channels[0]!["referenceJunction"] = JsonNode.Parse(junction);
        }

        channels.Add(JsonNode.Parse("""{ "id": "junction", "name": "Terminal block", "quantity": "reference-junction", "unit": "Cel", "intervalSeconds": 10 }"""));
        JsonNode certificate = file["instruments"]![0]!["certificates"]![0]!;
        certificate["characteristic"] = JsonNode.Parse(characteristic);
        file["instruments"]!.AsArray().Add(JsonNode.Parse("""
            {
              "id": "junction-1", "serialNumber": "S-9", "description": "Thermometer of the terminal block",
              "installations": [ { "source": "fir", "channel": "junction", "from": "2026-01-01T00:00:00Z" } ],
              "certificates": [ { "id": "c-9", "revision": 1, "number": "N-9", "issuer": "Invented laboratory", "validFrom": "2026-01-01T00:00:00Z", "range": { "minimumCelsius": 0, "maximumCelsius": 60 },
                "characteristic": { "kind": "correction-table", "expandedUncertaintyKelvin": 0.4, "coverageFactor": 2, "points": [ { "indicatedCelsius": 0, "correctionKelvin": 0 }, { "indicatedCelsius": 60, "correctionKelvin": 0 } ] } } ]
            }
            """));
        return LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString()));
    }
}
