using System.Collections.Immutable;

namespace LabWatch.Records.Accounts;

/// <summary>Words for roles. They belong to the stored format and to the API, and never change.</summary>
public static class RoleWords
{
    private static readonly (Role Role, string Word)[] Words =
    [
        (Role.Technician, "technician"),
        (Role.QualityManager, "quality-manager"),
        (Role.Auditor, "auditor"),
        (Role.Administrator, "administrator"),
    ];

    /// <summary>All words.</summary>
    public static ImmutableArray<string> All { get; } = [.. Words.Select(row => row.Word)];

    /// <summary>The word of a role.</summary>
    public static string Of(Role role) => Array.Find(Words, row => row.Role == role).Word;

    /// <summary>Reads a word; false where there is no such role.</summary>
    public static bool TryRead(string? word, out Role role)
    {
        int index = Array.FindIndex(Words, row => string.Equals(row.Word, word, StringComparison.Ordinal));
        role = index >= 0 ? Words[index].Role : default;
        return index >= 0;
    }

    /// <summary>Roles as one stored text, each once, in order.</summary>
    internal static string Join(IEnumerable<Role> roles) => string.Join(' ', roles.Distinct().Order().Select(Of));

    /// <summary>Reads a stored text.</summary>
    internal static ImmutableArray<Role> Split(string text) =>
        [.. text.Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(word => TryRead(word, out Role role) ? role : throw new InvalidDataException($"The records hold the unknown role '{word}'."))];
}
