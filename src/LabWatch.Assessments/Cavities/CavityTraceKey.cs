using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Metrology.Cavities;

namespace LabWatch.Assessments.Cavities;

/// <summary>What a trace depends on: nothing else enters its counts.</summary>
/// <param name="Geometry">Geometry, millimetres.</param>
/// <param name="View">View, millimetres.</param>
/// <param name="DiffuseFraction">Diffuse fraction of the reflection.</param>
/// <param name="Second">Surfaces of a second material.</param>
internal sealed record CavityTraceKey(CavityGeometry Geometry, CavityView View, double DiffuseFraction, SecondMaterial Second)
{
    /// <summary>SHA-256 over everything, options of the trace and version of the format included, as hexadecimal digits.</summary>
    public string Digest(MonteCarloOptions options)
    {
        FormattableString text =
            $"labwatch-trace-{HitCountsFormat.Version} {Geometry.Form} {Geometry.Radius:R} {Geometry.Length:R} {Geometry.ConeHalfAngleDegree:R} {Geometry.ApertureRadius:R} {View.Kind} {View.Radius:R} {View.Distance:R} {View.Position:R} {DiffuseFraction:R} {Second} {options.RaysPerReplicate} {options.Replicates} {options.Depth} {options.Seed}";
        return Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text.ToString(CultureInfo.InvariantCulture))));
    }
}
