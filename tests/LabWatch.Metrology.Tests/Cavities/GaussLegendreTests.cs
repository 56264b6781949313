using LabWatch.Metrology.Numerics;
using Xunit;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class GaussLegendreTests
{
    [Fact]
    public void A_rule_of_n_nodes_integrates_powers_up_to_2n_minus_1_exactly()
    {
        for (int n = 1; n <= 24; n++)
        {
            (double[] x, double[] w) = GaussLegendre.Rule(n);
            for (int power = 0; power < 2 * n; power++)
            {
                double sum = x.Zip(w, (node, weight) => weight * Math.Pow(node, power)).Sum();
                Assert.Equal(power % 2 == 0 ? 2.0 / (power + 1) : 0, sum, 1e-14);
            }
        }
    }
}
