using System.Security.Cryptography;
using System.Text.Json;
using System.Text.Json.Nodes;
using System.Text.Json.Serialization;
using LabWatch.Records.Audit;
using LabWatch.Service.Configuration;

namespace LabWatch.Service.Hosting;

/// <summary>
/// A digest of the options in force, so that the trail shows when they changed. Secrets are no options (only their names are); the
/// connection string of a database, which may hold one, is left out.
/// </summary>
internal static class ConfigurationDigest
{
    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web) { Converters = { new JsonStringEnumConverter() } };

    /// <summary>SHA-256 (small hexadecimal digits) over the canonical form of the options, and one for each section.</summary>
    public static JsonObject Of(ServiceSettings settings)
    {
        JsonObject sections = JsonSerializer.SerializeToNode(settings with { Records = settings.Records with { ConnectionString = null } }, Json)!.AsObject();
        JsonObject digests = [];
        foreach ((string section, JsonNode? options) in sections)
        {
            digests[section] = DigestOf(options);
        }

        return new JsonObject { ["digest"] = DigestOf(sections), ["sections"] = digests };
    }

    private static string DigestOf(JsonNode? options) => Convert.ToHexStringLower(SHA256.HashData(CanonicalJson.Write(options)));
}
