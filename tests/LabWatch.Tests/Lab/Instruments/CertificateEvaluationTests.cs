using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Lab.Instruments;

public sealed class CertificateEvaluationTests
{
    private static readonly Characteristic Pt100 = new CallendarVanDusenCharacteristic(0.02, 2, 100, 3.9083e-3, -5.775e-7, -4.183e-12);

    [Fact]
    public void Evaluate_ResistanceThermometer_GivesTemperatureUncertaintyAndSensitivity()
    {
        // IEC 60751:2022, clause 4.2: 138.5055 ohm at 100 degC.
        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(Covering(-40, 200, Pt100), 138.5055, "Ohm");

        Assert.Equal(100, evaluation.Celsius.Value, 1e-9);
        Assert.Equal(0.01, evaluation.Celsius.StandardUncertainty);
        Assert.Equal(2.6366, evaluation.Sensitivity, 1e-4);
        Assert.True(evaluation.InRange);
    }

    [Fact]
    public void Evaluate_IndicatedTemperature_AddsTheInterpolatedCorrection()
    {
        Characteristic table = new CorrectionTableCharacteristic(0.1, 2, [new(0, 0.0), new(100, 0.2)]);

        Assert.Equal(50.1, CertificateEvaluation.Evaluate(Covering(0, 100, table), 50, "Cel").Celsius.Value, 1e-12);
    }

    [Fact]
    public void Evaluate_OutsideTheCertificate_FlagsTheValueAndStatesNoUncertainty()
    {
        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(Covering(-40, 90, Pt100), 138.5055, "Ohm");

        Assert.Equal(100, evaluation.Celsius.Value, 1e-9);
        Assert.False(evaluation.InRange);
        Assert.True(double.IsNaN(evaluation.Celsius.StandardUncertainty));
    }

    [Fact]
    public void Evaluate_AnotherUnit_GivesNoValue()
    {
        Assert.Equal(TemperatureEvaluation.None, CertificateEvaluation.Evaluate(Covering(-40, 200, Pt100), 100, "Cel"));
    }

    [Fact]
    public void Evaluate_NaN_GivesNoValue()
    {
        Assert.Equal(TemperatureEvaluation.None, CertificateEvaluation.Evaluate(Covering(-40, 200, Pt100), double.NaN));
    }

    [Fact]
    public void Evaluate_Sprt_TakesTheTriplePointResistanceInForce()
    {
        SprtDeviation deviation = new(SprtSubrange.WaterToZinc, [-1.9736e-4, -2.114e-5]);
        Certificate certificate = Covering(0, 420, new SprtCharacteristic(0.004, 2, 25.4791120, null, deviation));
        double ohm = new Sprt(25.48, null, deviation).ResistanceOhm(300);

        TemperatureEvaluation own = CertificateEvaluation.Evaluate(certificate, ohm, "Ohm");
        TemperatureEvaluation inForce = CertificateEvaluation.Evaluate(
            certificate, ohm, "Ohm", new EvaluationConditions(new Estimate(25.48, 1e-5), null));

        Assert.Equal(300, inForce.Celsius.Value, 1e-9);
        Assert.NotEqual(300, own.Celsius.Value, 1e-3);
        Assert.Equal(0.002, own.Celsius.StandardUncertainty);
        Assert.True(inForce.Celsius.StandardUncertainty > 0.002);
    }

    [Fact]
    public void Evaluate_Thermocouple_AddsTheReferenceJunctionAndItsUncertainty()
    {
        // IEC 60584-1:2013 type K: 4.096 mV at 100 degC against 0 degC, 0.798 mV at 20 degC.
        Certificate certificate = Covering(-40, 1200, new ThermocoupleCharacteristic(1, 2, ThermocoupleType.K, [], null));

        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(
            certificate, 4.096 - 0.798, "mV", new EvaluationConditions(null, new Estimate(20, 0.3)));

        Assert.Equal(100, evaluation.Celsius.Value, 0.02);
        Assert.Equal(double.Hypot(0.5, 0.3 * 40.35 / 41.37), evaluation.Celsius.StandardUncertainty, 1e-3);
        Assert.Equal(TemperatureEvaluation.None, CertificateEvaluation.Evaluate(certificate, 3.3, "mV"));
    }

    [Fact]
    public void Evaluate_Thermocouple_KeptReferenceJunction_NeedsNoChannel()
    {
        Certificate certificate = Covering(-40, 1200, new ThermocoupleCharacteristic(1, 2, ThermocoupleType.K, [], 0));

        Assert.Equal(100, CertificateEvaluation.Evaluate(certificate, 4.096, "mV").Celsius.Value, 0.02);
    }

    [Fact]
    public void Evaluate_Polynomial_GivesItsValue()
    {
        Certificate certificate = Covering(0, 100, new PolynomialCharacteristic("V", 0.2, 2, [0, 10], 0, 10));

        Assert.Equal(50, CertificateEvaluation.Evaluate(certificate, 5, "V").Celsius.Value, 1e-12);
        Assert.Equal(TemperatureEvaluation.None, CertificateEvaluation.Evaluate(certificate, 11, "V"));
    }

    [Fact]
    public void Evaluate_RadiationThermometer_InvertsTheSakumaHattoriEquation()
    {
        SakumaHattori equation = new(0.9, 20, 1e-6);
        Certificate certificate = Covering(600, 1600, new SakumaHattoriCharacteristic("A", 0.5, 2, 0.9, 20, 1e-6));

        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(certificate, equation.Signal(1273.15), "A");

        Assert.Equal(1000, evaluation.Celsius.Value, 1e-8);
        Assert.True(evaluation.InRange);
    }

    [Fact]
    public void TriplePointInForce_IsTheLatestCheckInItsHighestRevision()
    {
        TriplePointCheck old = new("tpw-1", 1, "sprt-1", Instant.FromUnixSeconds(100), new Estimate(25.1, 1e-5));
        TriplePointCheck corrected = old with { Revision = 2, TriplePointOhm = new Estimate(25.2, 1e-5) };
        TriplePointCheck later = new("tpw-2", 1, "sprt-1", Instant.FromUnixSeconds(200), new Estimate(25.3, 1e-5));
        LabSnapshot snapshot = new(new LabSite("hollin-vale", "Hollin Vale", "Europe/Dublin"), [], [], [], [], [], [])
        {
            TriplePointChecks = [later, old, corrected],
        };

        Assert.Null(snapshot.TriplePointInForce("sprt-1", Instant.FromUnixSeconds(99)));
        Assert.Equal(corrected, snapshot.TriplePointInForce("sprt-1", Instant.FromUnixSeconds(199)));
        Assert.Equal(later, snapshot.TriplePointInForce("sprt-1", Instant.FromUnixSeconds(200)));
    }

    [Fact]
    public void CertificateInForce_CarriesTheTriplePointCheckInForce_AndNamesIt()
    {
        SprtDeviation deviation = new(SprtSubrange.WaterToZinc, [-1.9736e-4, -2.114e-5]);
        Certificate certificate = Covering(0, 420, new SprtCharacteristic(0.004, 2, 25.4791120, null, deviation));
        ChannelKey channel = new(new SourceKey("hollin-vale", "rowan"), "well-1");
        LabSnapshot snapshot = new(
            new LabSite("hollin-vale", "Hollin Vale", "Europe/Dublin"),
            [],
            [],
            [new Installation("pt-1", channel, Instant.FromUnixSeconds(0), null)],
            [certificate],
            [],
            [])
        {
            TriplePointChecks = [new("tpw-1", 2, "pt-1", Instant.FromUnixSeconds(100), new Estimate(25.48, 1e-5))],
        };
        double ohm = new Sprt(25.48, null, deviation).ResistanceOhm(300);

        Certificate before = snapshot.CertificateInForce(channel, Instant.FromUnixSeconds(99))!;
        Certificate after = snapshot.CertificateInForce(channel, Instant.FromUnixSeconds(100))!;

        Assert.Equal("cert-a@1", before.Reference);
        Assert.Equal("cert-a@1+tpw-1@2", after.Reference);
        Assert.Equal(300, CertificateEvaluation.Evaluate(after, ohm, "Ohm").Celsius.Value, 1e-9);
        Assert.NotEqual(300, CertificateEvaluation.Evaluate(before, ohm, "Ohm").Celsius.Value, 1e-3);
    }

    private static Certificate Covering(double minimum, double maximum, Characteristic characteristic) =>
        new("cert-a", 1, "pt-1", "HV-0001", "hollin-vale", Instant.FromUnixSeconds(0), null, minimum, maximum, characteristic);
}
