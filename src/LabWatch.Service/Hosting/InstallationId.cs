using System.Security.Cryptography;

namespace LabWatch.Service.Hosting;

/// <summary>What tells this installation from others at a broker: drawn once, kept in the data directory.</summary>
internal static class InstallationId
{
    /// <summary>The id of a data directory; drawn and kept where there is none yet.</summary>
    public static string Of(string dataDirectory)
    {
        string path = Path.Combine(dataDirectory, "installation-id");
        if (File.Exists(path) && File.ReadAllText(path).Trim() is { Length: > 0 } known)
        {
            return known;
        }

        string drawn = Convert.ToHexStringLower(RandomNumberGenerator.GetBytes(8));
        File.WriteAllText(path, drawn + "\n");
        return drawn;
    }
}
