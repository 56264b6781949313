using LabWatch.Records.Accounts;
using Microsoft.Net.Http.Headers;

namespace LabWatch.Service.Api.Access;

/// <summary>The secret that a request carries, as its digest.</summary>
/// <param name="Digest">SHA-256, small hexadecimal digits.</param>
/// <param name="IsToken">Whether it is a token in the header Authorization; else the secret of a session in the cookie.</param>
internal sealed record Credential(string Digest, bool IsToken)
{
    private const string Bearer = "Bearer ";
    private const int LongestSecret = 64;

    /// <summary>Reads it from a request; null where there is none. A token goes before a cookie, and a wrong one does not fall back to it.</summary>
    public static Credential? Of(HttpRequest request)
    {
        string? authorization = request.Headers[HeaderNames.Authorization];
        if (!string.IsNullOrEmpty(authorization))
        {
            string token = authorization.StartsWith(Bearer, StringComparison.OrdinalIgnoreCase) ? authorization[Bearer.Length..].Trim() : string.Empty;
            return Secret.IsToken(token) ? new Credential(Secret.DigestOf(token), true) : null;
        }

        string? secret = request.Cookies[SessionCookie.NameFor(request)];
        return string.IsNullOrEmpty(secret) || secret.Length > LongestSecret ? null : new Credential(Secret.DigestOf(secret), false);
    }
}
