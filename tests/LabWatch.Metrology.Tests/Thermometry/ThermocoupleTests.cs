using FsCheck.Xunit;
using LabWatch.Metrology.Thermometry;
using Xunit;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class ThermocoupleTests
{
    public static TheoryData<ThermocoupleType> Types => [.. Enum.GetValues<ThermocoupleType>()];

    [Theory]
    [MemberData(nameof(Types))]
    public void Inverse_of_the_emf_is_the_identity(ThermocoupleType type)
    {
        ThermocoupleReference reference = ThermocoupleReference.Of(type);
        double span = reference.MaximumCelsius - reference.MinimumInvertibleCelsius;
        for (int i = 0; i <= 1000; i++)
        {
            double celsius = reference.MinimumInvertibleCelsius + (span * i / 1000);
            Assert.Equal(celsius, reference.CelsiusOf(reference.EmfMillivolt(celsius)), celsius < -200 ? 1e-7 : 1e-9);
        }
    }

    [Theory]
    [MemberData(nameof(Types))]
    public void Emf_rises_wherever_it_is_inverted(ThermocoupleType type)
    {
        ThermocoupleReference reference = ThermocoupleReference.Of(type);
        for (double celsius = reference.MinimumInvertibleCelsius; celsius <= reference.MaximumCelsius; celsius += 0.5)
        {
            Assert.True(reference.SlopeMillivoltPerKelvin(celsius) > 0, $"{type} at {celsius}");
        }
    }

    [Property]
    public bool Deviation_and_cold_junction_are_undone_exactly(ushort hotDraw, byte coldDraw)
    {
        Thermocouple thermocouple = new(ThermocoupleType.S, [2e-5, -3e-8]);
        double hot = 100 + (1500.0 * hotDraw / ushort.MaxValue);
        double cold = 50.0 * coldDraw / byte.MaxValue;
        double measured = thermocouple.EmfMillivolt(hot) - thermocouple.EmfMillivolt(cold);
        return Math.Abs(thermocouple.CelsiusOf(measured, cold) - hot) < 1e-8;
    }

    [Fact]
    public void Evaluate_WithoutColdJunction_GivesNoValue()
    {
        Assert.Equal(TemperatureEvaluation.None, new Thermocouple(ThermocoupleType.K, []).Evaluate(4, double.NaN, 0.5));
    }

    [Theory]
    [InlineData(ThermocoupleType.K, 60)]
    [InlineData(ThermocoupleType.K, -7)]
    [InlineData(ThermocoupleType.B, 0)]
    public void Evaluate_EmfThatTheTypeCannotGive_GivesNoValue(ThermocoupleType type, double millivolt)
    {
        Assert.Equal(TemperatureEvaluation.None, new Thermocouple(type, []).Evaluate(millivolt, 0, 0.5));
    }

    [Fact]
    public void Sensitivity_is_the_reciprocal_slope()
    {
        TemperatureEvaluation evaluation = new Thermocouple(ThermocoupleType.K, []).Evaluate(4.096, 0, 0.5);

        // IEC 60584-1: type K, 4.096 mV at 100 degC, Seebeck coefficient there 41.37 uV/K.
        Assert.Equal(100, evaluation.Celsius.Value, 0.02);
        Assert.Equal(1 / 0.04137, evaluation.Sensitivity, 0.02);
    }
}
