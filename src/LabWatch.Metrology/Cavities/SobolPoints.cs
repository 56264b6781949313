using System.Numerics;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Metrology.Cavities;

/// <summary>
/// One randomisation of a Sobol sequence in 21 dimensions: direction numbers of S. Joe and F. Y. Kuo, SIAM J. Sci. Comput. 30 (2008) 2635-2654 (from memory; each
/// dimension is checked to be a permutation in the tests), scrambled by a random lower-triangular matrix and a digital shift for each dimension
/// (J. Matousek, J. Complexity 14 (1998) 527-556), which leaves every point uniform and the mean of any function without bias.
/// </summary>
internal sealed class SobolPoints
{
    public const int Dimensions = 21;
    private const int Bits = 32;

    // Degree, coefficients of the primitive polynomial, first direction numbers, for dimensions 2 to 21.
    private static readonly (int Degree, int Polynomial, uint[] First)[] Table =
    [
        (1, 0, [1]), (2, 1, [1, 3]), (3, 1, [1, 3, 1]), (3, 2, [1, 1, 1]), (4, 1, [1, 1, 3, 3]), (4, 4, [1, 3, 5, 13]), (5, 2, [1, 1, 5, 5, 17]),
        (5, 4, [1, 1, 5, 5, 5]), (5, 7, [1, 1, 7, 11, 19]), (5, 11, [1, 1, 5, 1, 1]), (5, 13, [1, 1, 1, 3, 11]), (5, 14, [1, 3, 5, 5, 31]),
        (6, 1, [1, 3, 3, 9, 7, 49]), (6, 13, [1, 1, 1, 15, 21, 21]), (6, 16, [1, 3, 1, 13, 27, 49]), (6, 19, [1, 1, 1, 15, 7, 5]),
        (6, 22, [1, 3, 1, 15, 13, 25]), (6, 25, [1, 1, 5, 5, 19, 61]), (7, 1, [1, 3, 7, 11, 23, 15, 103]), (7, 4, [1, 3, 7, 13, 13, 15, 69]),
    ];

    private readonly uint[] _directions = new uint[Dimensions * Bits];
    private readonly uint[] _state = new uint[Dimensions];
    private uint _index = uint.MaxValue;

    public SobolPoints(ref Xoshiro256 random)
    {
        for (int d = 0; d < Dimensions; d++)
        {
            uint[] plain = Directions(d);
            uint[] columns = Scramble(ref random);
            for (int bit = 0; bit < Bits; bit++) _directions[bit * Dimensions + d] = Apply(columns, plain[bit]);
            _state[d] = (uint)(random.Next() >> 32);
        }
    }

    /// <summary>A coordinate of the present point, in the open interval (0, 1).</summary>
    public double this[int dimension] => (_state[dimension] + 0.5) * (1.0 / 4294967296.0);

    /// <summary>Goes to the next point, in the order of the Gray code (I. A. Antonov and V. M. Saleev, 1979).</summary>
    public void Next()
    {
        _index = unchecked(_index + 1);
        if (_index == 0) return; // the first point is the shift itself
        ReadOnlySpan<uint> row = _directions.AsSpan(BitOperations.TrailingZeroCount(_index) * Dimensions, Dimensions);
        for (int d = 0; d < Dimensions; d++) _state[d] ^= row[d];
    }

    internal static uint[] Directions(int dimension)
    {
        uint[] v = new uint[Bits];
        if (dimension == 0)
        {
            for (int i = 0; i < Bits; i++) v[i] = 1u << (Bits - 1 - i);
            return v;
        }

        (int degree, int polynomial, uint[] first) = Table[dimension - 1];
        for (int i = 0; i < Bits; i++)
        {
            if (i < degree)
            {
                v[i] = first[i] << (Bits - 1 - i);
                continue;
            }

            v[i] = v[i - degree] ^ (v[i - degree] >> degree);
            for (int k = 1; k < degree; k++)
            {
                if (((polynomial >> (degree - 1 - k)) & 1) != 0) v[i] ^= v[i - k];
            }
        }

        return v;
    }

    /// <summary>The columns of a random lower-triangular matrix over the bits, the leading bit first, with ones on its diagonal.</summary>
    private static uint[] Scramble(ref Xoshiro256 random)
    {
        uint[] columns = new uint[Bits];
        for (int i = 0; i < Bits; i++)
        {
            uint diagonal = 1u << (Bits - 1 - i);
            columns[i] = diagonal | ((uint)(random.Next() >> 32) & (diagonal - 1));
        }

        return columns;
    }

    private static uint Apply(uint[] columns, uint value)
    {
        uint result = 0;
        for (int i = 0; i < Bits; i++)
        {
            if ((value >> (Bits - 1 - i) & 1) != 0) result ^= columns[i];
        }

        return result;
    }
}
