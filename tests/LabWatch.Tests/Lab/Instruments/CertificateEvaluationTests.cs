using LabWatch.Lab.Instruments;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;

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

    private static Certificate Covering(double minimum, double maximum, Characteristic characteristic) =>
        new("cert-a", 1, "pt-1", "HV-0001", "hollin-vale", Instant.FromUnixSeconds(0), null, minimum, maximum, characteristic);
}
