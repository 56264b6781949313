using System.Text.Json;

namespace LabWatch.Service.Api;

/// <summary>Writes enumeration members as the API does: small letters, words joined by hyphens.</summary>
internal static class Names
{
    /// <summary>The API's name of a member, for example <c>well-thermometer</c>.</summary>
    public static string Of<T>(T value)
        where T : struct, Enum => JsonNamingPolicy.KebabCaseLower.ConvertName(value.ToString());

    /// <summary>The API's names of the bits that are set, empty for none.</summary>
    public static IReadOnlyList<string> OfFlags<T>(T value)
        where T : struct, Enum =>
        [.. Enum.GetValues<T>().Where(bit => Convert.ToInt64(bit, null) != 0 && value.HasFlag(bit)).Select(Of)];
}
