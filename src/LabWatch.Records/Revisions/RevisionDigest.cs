using System.Security.Cryptography;
using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Records.Audit;

namespace LabWatch.Records.Revisions;

/// <summary>The one text of a content, and its digest.</summary>
internal static class RevisionDigest
{
    /// <summary>Digest of a withdrawal: SHA-256 of nothing.</summary>
    public static string OfWithdrawal { get; } = Of(string.Empty);

    /// <summary>The canonical text of a content.</summary>
    public static string Text(JsonObject content) => Encoding.UTF8.GetString(CanonicalJson.Write(content));

    /// <summary>SHA-256 of a text's UTF-8 bytes, small hexadecimal digits.</summary>
    public static string Of(string text) => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)));
}
