using System.Collections.Immutable;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Records.Accounts;

namespace LabWatch.Service.Api.Accounts;

/// <summary>Findings about names and roles.</summary>
internal static class AccountChecks
{
    private const int LongestDisplayName = 80;

    // Names that stand for something else in the trail and in messages.
    private static readonly string[] Reserved = ["labwatch", "system", "anybody", "nobody", "unknown"];

    /// <summary>A slug that may become the name of an account.</summary>
    public static IEnumerable<Finding> Name(string? name)
    {
        if (string.IsNullOrEmpty(name))
        {
            yield return new Finding("missing", "/name", "The name of the account is missing.", null, "Give small letters, digits and hyphens, for example kim-lee.");
        }
        else if (!Slug.IsValid(name))
        {
            yield return new Finding("not-a-slug", "/name", "This is no name of an account.", Finding.Quote(name), "Use 1 to 63 small letters, digits and hyphens; begin with a letter or digit.");
        }
        else if (Reserved.Contains(name, StringComparer.Ordinal))
        {
            yield return new Finding("name-reserved", "/name", "This name stands for something else.", Finding.Quote(name), "Choose another name.");
        }
    }

    /// <summary>A name for people.</summary>
    public static IEnumerable<Finding> DisplayName(string? name, string where = "/displayName", bool isNeeded = true)
    {
        if (name is null && !isNeeded)
        {
            yield break;
        }

        if (string.IsNullOrWhiteSpace(name) || name.Trim().Length > LongestDisplayName || name.Any(char.IsControl))
        {
            yield return new Finding("not-a-name", where, "This is no name for people.", Finding.Quote(name), "Give 1 to 80 characters without line breaks.");
        }
    }

    /// <summary>Roles; an empty list is a finding.</summary>
    public static (ImmutableArray<Role> Roles, IEnumerable<Finding> Findings) Roles(IReadOnlyList<string>? words)
    {
        List<Finding> findings = [];
        ImmutableArray<Role>.Builder roles = ImmutableArray.CreateBuilder<Role>();
        if (words is not { Count: > 0 })
        {
            findings.Add(new Finding("missing", "/roles", "No role is given.", null, "Give at least one of: " + string.Join(", ", RoleWords.All) + "."));
        }

        foreach (string? word in words ?? [])
        {
            if (RoleWords.TryRead(word, out Role role))
            {
                roles.Add(role);
            }
            else
            {
                findings.Add(new Finding("unknown-role", "/roles", "There is no such role.", Finding.Quote(word), "Use: " + string.Join(", ", RoleWords.All) + "."));
            }
        }

        return ([.. roles.Distinct().Order()], findings);
    }
}
