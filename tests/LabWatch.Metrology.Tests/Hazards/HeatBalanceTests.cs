using LabWatch.Metrology.Hazards;
using Xunit;

namespace LabWatch.Metrology.Tests.Hazards;

/// <summary>
/// Against the closed solution of one lump heated by a constant power, T - Ta = P/G (1 - exp(-G t/C)): Incropera and others, Fundamentals of Heat
/// and Mass Transfer, 6th ed., section 5.3 (general lumped capacitance analysis), equation from memory and checked by differentiation.
/// </summary>
public sealed class HeatBalanceTests
{
    private const double Capacity = 5000;
    private const double Loss = 0.8;
    private const double Watt = 600;
    private const double Ambient = 23;

    [Fact]
    public void Expected_rise_is_that_of_the_closed_solution()
    {
        HeatBalance balance = new(Capacity, Loss, 600);
        for (int second = 0; second <= 700; second++)
        {
            balance.Add(second, Closed(second), Watt, Ambient, 500);
        }

        HeatSpan span = balance.Over(600)!.Value;

        // The trapezoids of one-second steps are exact to 1e-6 here.
        Assert.Equal(span.MeasuredKelvin, span.ExpectedKelvin, 1e-4);
        Assert.Equal(Closed(700) - Closed(700 - span.Seconds), span.MeasuredKelvin, 1e-9);
        Assert.Equal(Watt, span.MeanWatt, 1e-9);
        Assert.Equal(0, span.UnexplainedPart, 1e-5);
        Assert.Equal(Closed(700 - span.Seconds) - 500, span.LeastExcessKelvin, 1e-9);
    }

    [Fact]
    public void A_thermometer_out_of_its_well_misses_nearly_all_heat()
    {
        HeatBalance balance = new(Capacity, Loss, 600);
        for (int second = 0; second <= 700; second += 10)
        {
            balance.Add(second, Ambient, Watt, Ambient, 500);
        }

        HeatSpan span = balance.Over(600)!.Value;
        Assert.Equal(Watt * span.Seconds / Capacity, span.ExpectedKelvin, 1e-9);
        Assert.Equal(1, span.UnexplainedPart, 1e-9);
    }

    [Fact]
    public void Nothing_is_told_before_the_span_is_held_and_a_gap_begins_anew()
    {
        HeatBalance balance = new(Capacity, Loss, 600);
        for (int second = 0; second < 600; second += 10)
        {
            balance.Add(second, Ambient, Watt, Ambient, 500);
        }

        Assert.Null(balance.Over(600));
        balance.Add(700, Ambient, Watt, Ambient, 500);
        Assert.Null(balance.Over(60));
        balance.Add(690, Ambient, Watt, Ambient, 500);
        Assert.Null(balance.Over(1));
    }

    private static double Closed(double seconds) => Ambient + (Watt / Loss * (1 - Math.Exp(-Loss * seconds / Capacity)));
}
