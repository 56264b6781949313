using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;

namespace LabWatch.Records.Accounts;

/// <summary>Entries of the audit trail about accounts, sessions and tokens. No hash, secret or token ever stands in one.</summary>
internal static class AccountNotes
{
    public static AuditNote Created(string site, Account account, string by, Instant at) => new(
        site, at, by, "account-created", string.Empty,
        new JsonObject
        {
            ["displayName"] = account.DisplayName,
            ["roles"] = Roles(account),
            ["mustChangePassword"] = account.MustChangePassword,
        },
        null);

    public static AuditNote SetUpDone(string site, string name, Instant at) =>
        new(site, at, name, "set-up-done", "site/" + site, new JsonObject { ["administrator"] = name }, null);

    public static AuditNote Changed(string site, Account before, Account after, AccountChange change, string by, Instant at)
    {
        JsonObject content = [];
        if (before.DisplayName != after.DisplayName)
        {
            content["displayName"] = FromTo(before.DisplayName, after.DisplayName);
        }

        if (RoleWords.Join(before.Roles) != RoleWords.Join(after.Roles))
        {
            content["roles"] = new JsonObject { ["from"] = Roles(before), ["to"] = Roles(after) };
        }

        if (before.IsDisabled != after.IsDisabled)
        {
            content["disabled"] = after.IsDisabled;
        }

        if (change.Password is not null)
        {
            content["password"] = change.IsSamePassword ? "stored with stronger parameters" : change.MustChangePassword ? "reset, to be changed at the next sign-in" : "changed";
        }

        bool isPassword = change.Password is not null && !change.IsSamePassword && content.Count == 1;
        return new AuditNote(site, at, by, isPassword ? "password-changed" : "account-changed", string.Empty, content, null);
    }

    public static AuditNote Refused(string site, SignInRefusals refusals, Instant at)
    {
        JsonObject content = new()
        {
            ["count"] = refusals.Count,
            ["from"] = refusals.From.ToString(),
            ["to"] = refusals.To.ToString(),
            ["addresses"] = new JsonArray([.. refusals.Addresses.Select(address => (JsonNode?)address)]),
        };
        if (refusals.Account is not null)
        {
            content["consecutive"] = refusals.Failures;
        }

        return new AuditNote(site, at, "labwatch", "sign-in-refused", refusals.Account is { } name ? "sign-in/" + name : "sign-in", content, null);
    }

    public static AuditNote SignedIn(string site, Session session, Instant at) => new(
        site, at, session.Account, "signed-in", "session/" + session.Id,
        new JsonObject { ["address"] = session.Address, ["agent"] = session.Agent }, null);

    public static AuditNote SignedOut(string site, string account, Guid session, Instant at) =>
        new(site, at, account, "signed-out", "session/" + session, [], null);

    public static AuditNote TokenCreated(string site, ApiToken token) => new(
        site, token.CreatedAt, token.Account, "token-created", string.Empty,
        new JsonObject { ["name"] = token.Name, ["roles"] = new JsonArray([.. token.Roles.Select(role => (JsonNode?)RoleWords.Of(role))]), ["expiresAt"] = token.ExpiresAt.ToString() },
        null);

    public static AuditNote TokenRevoked(string site, string account, string name, string by, Instant at) =>
        new(site, at, by, "token-revoked", string.Empty, new JsonObject { ["account"] = account, ["name"] = name }, null);

    private static JsonArray Roles(Account account) => [.. account.Roles.Select(role => (JsonNode?)RoleWords.Of(role))];

    private static JsonObject FromTo(string from, string to) => new() { ["from"] = from, ["to"] = to };
}
