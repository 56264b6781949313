using LabWatch.Simulator.Thermal;

namespace LabWatch.Simulator.Radiance;

/// <summary>
/// What a detector on the axis sees of a cavity: the bottom, with what it reflects. Net radiation method for diffuse grey walls
/// (Incropera and DeWitt, 6th ed., section 13.3), the mirror-like part of the bottom's reflection taken once. The radiance seen is
/// sum over elements of weight times the element's blackbody radiance, plus the plate's and the background's share; all shares sum to one.
/// </summary>
internal sealed class CavityView
{
    private readonly double[,] _factors;
    private readonly double[] _toPlate;
    private readonly double[] _toAperture;
    private readonly double _bottomAreaRatio;
    private readonly bool _mirrorsAperture;
    private readonly int _count;

    /// <summary>Prepares the view factors of a cavity; a conical bottom has a half-angle, a flat one has none.</summary>
    public CavityView(CylinderExchange exchange, int rings, double? coneHalfAngleDegree)
    {
        _count = rings + 1;
        _factors = new double[_count, _count];
        _toPlate = new double[_count];
        _toAperture = new double[_count];
        _mirrorsAperture = coneHalfAngleDegree is null;
        _bottomAreaRatio = coneHalfAngleDegree is { } angle ? Math.Sin(angle * Math.PI / 180) : 1;
        for (int i = 0; i < rings; i++)
        {
            for (int j = 0; j < rings; j++)
            {
                _factors[i, j] = exchange.RingToRing(i, j) / exchange.RingArea;
            }

            _factors[i, rings] = exchange.RingToBottom(i) / exchange.RingArea;
            _factors[rings, i] = exchange.RingToBottom(i) / exchange.BottomArea;
            _toPlate[i] = exchange.RingToPlate(i) / exchange.RingArea;
            _toAperture[i] = exchange.RingToAperture(i) / exchange.RingArea;
        }

        _toPlate[rings] = exchange.BottomToPlate / exchange.BottomArea;
        _toAperture[rings] = exchange.BottomToAperture / exchange.BottomArea;
        Weights = new double[_count];
    }

    /// <summary>Weights of the rings, then of the bottom; their sum is the effective emissivity of the isothermal cavity.</summary>
    public double[] Weights { get; }

    /// <summary>Share of the aperture plate's own radiance.</summary>
    public double PlateWeight { get; private set; }

    /// <summary>Share of the surroundings' radiance.</summary>
    public double BackgroundWeight { get; private set; }

    /// <summary>Computes the weights for a coating: emissivity and diffuse fraction of the reflection, each 0 to 1.</summary>
    public void Evaluate(double emissivity, double diffuseFraction)
    {
        int bottom = _count - 1;
        double reflectance = 1 - emissivity;
        double bottomEmissivity = emissivity / (emissivity + (reflectance * _bottomAreaRatio));
        double bottomReflectance = 1 - bottomEmissivity;
        double mirrored = bottomReflectance * (1 - diffuseFraction);
        double scattered = bottomReflectance * diffuseFraction;

        double[] arriving = new double[_count];
        for (int i = 0; i < _count; i++)
        {
            arriving[i] = scattered * _factors[bottom, i];
        }

        if (!_mirrorsAperture)
        {
            arriving[bottom - 1] += mirrored;
        }

        double[] share = SolveTransposed(arriving, reflectance, bottomReflectance);
        double plate = scattered * _toPlate[bottom];
        double background = (scattered * _toAperture[bottom]) + (_mirrorsAperture ? mirrored : 0);
        for (int i = 0; i < _count; i++)
        {
            double own = i == bottom ? bottomEmissivity : emissivity;
            Weights[i] = own * share[i];
            plate += (1 - own) * share[i] * _toPlate[i];
            background += (1 - own) * share[i] * _toAperture[i];
        }

        Weights[bottom] += bottomEmissivity;
        PlateWeight = plate;
        BackgroundWeight = background;
    }

    // (I - diag(reflectance) F)^T x = right side, by elimination; the matrix is strictly diagonally dominant, so no pivoting is needed.
    private double[] SolveTransposed(double[] right, double reflectance, double bottomReflectance)
    {
        double[,] matrix = new double[_count, _count];
        double[] x = (double[])right.Clone();
        for (int row = 0; row < _count; row++)
        {
            for (int column = 0; column < _count; column++)
            {
                double reflects = column == _count - 1 ? bottomReflectance : reflectance;
                matrix[row, column] = (row == column ? 1 : 0) - (reflects * _factors[column, row]);
            }
        }

        for (int pivot = 0; pivot < _count; pivot++)
        {
            for (int row = pivot + 1; row < _count; row++)
            {
                double factor = matrix[row, pivot] / matrix[pivot, pivot];
                for (int column = pivot; column < _count; column++)
                {
                    matrix[row, column] -= factor * matrix[pivot, column];
                }

                x[row] -= factor * x[pivot];
            }
        }

        for (int row = _count - 1; row >= 0; row--)
        {
            for (int column = row + 1; column < _count; column++)
            {
                x[row] -= matrix[row, column] * x[column];
            }

            x[row] /= matrix[row, row];
        }

        return x;
    }
}
