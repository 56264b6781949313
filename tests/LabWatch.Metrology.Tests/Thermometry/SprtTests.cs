using FsCheck.Xunit;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class SprtTests
{
    public static TheoryData<SprtSubrange> Subranges => [.. Enum.GetValues<SprtSubrange>()];

    [Theory]
    [MemberData(nameof(Subranges))]
    public void Inverse_of_the_resistance_is_the_identity_over_the_whole_subrange(SprtSubrange subrange)
    {
        SprtDeviation deviation = Invented(subrange);
        Sprt sprt = new(25.5, deviation, null);
        for (int i = 0; i <= 200; i++)
        {
            double celsius = deviation.MinimumKelvin + ((deviation.MaximumKelvin - deviation.MinimumKelvin) * i / 200) - Its90.CelsiusOffset;
            TemperatureEvaluation back = sprt.Evaluate(sprt.ResistanceOhm(celsius), 0.001);

            // The reference functions meet at the triple point within 1.2 uK, so that a temperature just above it is not found again exactly.
            Assert.Equal(celsius, back.Celsius.Value, Math.Abs(celsius - 0.01) < 0.02 ? 2e-6 : 2e-9);
            Assert.True(back.InRange);
        }
    }

    [Theory]
    [MemberData(nameof(Subranges))]
    public void Slope_is_the_derivative_of_the_deviation(SprtSubrange subrange)
    {
        SprtDeviation deviation = Invented(subrange);
        double ratio = Its90.Ratio(0.3 * deviation.MinimumKelvin + (0.7 * deviation.MaximumKelvin));
        double step = 1e-6;

        Assert.Equal((deviation.Value(ratio + step) - deviation.Value(ratio - step)) / (2 * step), deviation.Slope(ratio), 1e-9);
    }

    [Property]
    public bool Sensitivity_is_the_derivative_by_resistance(ushort draw)
    {
        Sprt sprt = new(25.5, Invented(SprtSubrange.ArgonToWater), Invented(SprtSubrange.WaterToSilver));
        double ohm = sprt.ResistanceOhm(-180 + (1100.0 * draw / ushort.MaxValue));
        double step = 1e-4;
        double difference = (sprt.Evaluate(ohm + step, 0).Celsius.Value - sprt.Evaluate(ohm - step, 0).Celsius.Value) / (2 * step);
        return Math.Abs(sprt.Evaluate(ohm, 0).Sensitivity - difference) < 1e-3 * difference || Math.Abs(ohm - 25.5) < 0.01;
    }

    [Fact]
    public void Sensitivity_to_the_triple_point_is_the_derivative()
    {
        Sprt sprt = new(25.5, null, Invented(SprtSubrange.WaterToZinc));
        double ohm = sprt.ResistanceOhm(300);
        double difference = ((sprt with { TriplePointOhm = 25.5001 }).Evaluate(ohm, 0).Celsius.Value
            - (sprt with { TriplePointOhm = 25.4999 }).Evaluate(ohm, 0).Celsius.Value) / 2e-4;

        Assert.Equal(difference, sprt.SensitivityToTriplePoint(ohm), 1e-4);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    public void Evaluate_ResistanceWithoutTemperature_GivesNoValue(double ohm)
    {
        Assert.Equal(TemperatureEvaluation.None, new Sprt(25.5, null, Invented(SprtSubrange.WaterToZinc)).Evaluate(ohm, 0.001));
    }

    [Fact]
    public void Evaluate_BeyondTheSubrange_FlagsTheValue()
    {
        Sprt sprt = new(25.5, null, Invented(SprtSubrange.WaterToZinc));

        Assert.False(sprt.Evaluate(sprt.ResistanceOhm(430), 0.001).InRange);
        Assert.False(sprt.Evaluate(sprt.ResistanceOhm(-5), 0.001).InRange);
        Assert.True(sprt.Evaluate(sprt.ResistanceOhm(419.53), 0.001).InRange);
    }

    [Fact]
    public void Zero_power_of_equal_resistances_is_that_resistance()
    {
        Assert.Equal(100, ZeroPower.Extrapolate(new Estimate(100, 1e-5), 1, new Estimate(100, 1e-5), 1.4142).Value, 1e-12);
    }

    private static SprtDeviation Invented(SprtSubrange subrange) =>
        new(subrange, [.. SprtSubranges.Coefficients(subrange).Select(name => name[0] switch { 'a' => -2e-4, 'b' => -3e-5, _ => 1e-11 })]);
}
