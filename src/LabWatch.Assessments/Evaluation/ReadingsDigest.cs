using System.Security.Cryptography;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>SHA-256 over the canonical form of raw readings (<see cref="CanonicalReadings"/>): what an assessment names as its evidence.</summary>
public static class ReadingsDigest
{
    /// <summary>The digest, 64 small hexadecimal digits.</summary>
    public static string Of(ReadingWindow readings)
    {
        ArgumentNullException.ThrowIfNull(readings);
        using IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        CanonicalReadings.AppendTo(hash, readings.Source, readings.Series);
        return Convert.ToHexStringLower(hash.GetHashAndReset());
    }
}
