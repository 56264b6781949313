using System.Numerics;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// The generator xoshiro256** of D. Blackman and S. Vigna, "Scrambled linear pseudorandom number generators", ACM Trans. Math. Softw. 47 (2021) 36, seeded through
/// SplitMix64. The same seed gives the same numbers on every platform and version. Not for secrets.
/// </summary>
internal struct Xoshiro256
{
    private ulong _a;
    private ulong _b;
    private ulong _c;
    private ulong _d;

    public Xoshiro256(ulong seed)
    {
        _a = SplitMix(ref seed);
        _b = SplitMix(ref seed);
        _c = SplitMix(ref seed);
        _d = SplitMix(ref seed);
    }

    /// <summary>The next 64 random bits.</summary>
    public ulong Next()
    {
        unchecked
        {
            ulong result = BitOperations.RotateLeft(_b * 5, 7) * 9;
            ulong t = _b << 17;
            _c ^= _a;
            _d ^= _b;
            _b ^= _c;
            _a ^= _d;
            _c ^= t;
            _d = BitOperations.RotateLeft(_d, 45);
            return result;
        }
    }

    /// <summary>The next uniform number in the open interval (0, 1), a multiple of 2^-53 plus half of that.</summary>
    public double NextUniform() => ((Next() >> 11) + 0.5) * (1.0 / (1UL << 53));

    /// <summary>The next standard normal number, by inversion, so that one number is used for each.</summary>
    public double NextNormal() => NormalQuantile.Of(NextUniform());

    private static ulong SplitMix(ref ulong state)
    {
        unchecked
        {
            state += 0x9E3779B97F4A7C15;
            ulong z = state;
            z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
            z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
            return z ^ (z >> 31);
        }
    }
}
