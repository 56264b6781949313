using System.Text;

namespace LabWatch.Service.Calc;

/// <summary>Members of an enumeration by slugs: <c>WaterToTin</c> is <c>water-to-tin</c>.</summary>
/// <typeparam name="T">The enumeration.</typeparam>
internal static class Slugged<T>
    where T : struct, Enum
{
    private static readonly Dictionary<string, T> ByName = Enum.GetValues<T>().ToDictionary(Of, StringComparer.Ordinal);

    /// <summary>All slugs in the order of the enumeration.</summary>
    public static IReadOnlyList<string> Names { get; } = [.. Enum.GetValues<T>().Select(Of)];

    /// <summary>The slug of a member.</summary>
    public static string Of(T member)
    {
        StringBuilder slug = new();
        foreach (char c in member.ToString())
        {
            if (char.IsUpper(c) && slug.Length > 0)
            {
                slug.Append('-');
            }

            slug.Append(char.ToLowerInvariant(c));
        }

        return slug.ToString();
    }

    /// <summary>The member of a slug that <see cref="Names"/> holds.</summary>
    public static T Parse(string name) => ByName[name];
}
