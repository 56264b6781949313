using System.Net.Http.Headers;
using System.Net.Http.Json;
using System.Text.Json;
using System.Text.RegularExpressions;

namespace LabWatch.SystemTests.Service;

/// <summary>Lets tests call the API as somebody.</summary>
internal static partial class SignedIn
{
    /// <summary>The password of the first administrator that tests make.</summary>
    public const string Password = "seven quiet herons over slate";

    /// <summary>The codes that a demo printed: name of the account to code.</summary>
    public static IReadOnlyDictionary<string, string> DemoCodes(this LabWatchProcess demo) =>
        CodeLine().Matches(demo.Output).ToDictionary(match => match.Groups["name"].Value, match => match.Groups["code"].Value, StringComparer.Ordinal);

    /// <summary>Signs the client of a demo in as one of its people. Its cookie counts from then on.</summary>
    public static async Task SignInAsync(this LabWatchProcess demo, string name, CancellationToken cancellationToken)
    {
        await Poll.UntilAsync("the codes are printed", () => Task.FromResult(demo.DemoCodes().ContainsKey(name)), TimeSpan.FromSeconds(120), cancellationToken, () => demo.Output);
        await Poll.UntilAsync(
            "the person is signed in",
            async () =>
            {
                using HttpResponseMessage answer = await demo.Client.PostAsJsonAsync("api/v1/sign-in", new { name, password = demo.DemoCodes()[name] }, cancellationToken);
                return answer.IsSuccessStatusCode;
            },
            TimeSpan.FromSeconds(120), cancellationToken, () => demo.Output);
    }

    /// <summary>Plays the set-up of a fresh service with the code that it printed.</summary>
    /// <returns>A token with all roles.</returns>
    public static async Task<string> SetUpAsync(this LabWatchProcess service, string dataDirectory, CancellationToken cancellationToken)
    {
        string file = Path.Combine(dataDirectory, "set-up-code");
        await Poll.UntilAsync("the code of the set-up is there", () => Task.FromResult(File.Exists(file) && service.Output.Contains("/set-up", StringComparison.Ordinal)), TimeSpan.FromSeconds(120), cancellationToken, () => service.Output);
        string code = (await File.ReadAllTextAsync(file, cancellationToken)).Trim();
        await PostAsync(service, "api/v1/set-up", new { code, name = "first", displayName = "First Administrator", password = Password }, cancellationToken);
        Assert.False(File.Exists(file), "The code is good once.");
        string[] roles = ["technician", "quality-manager", "auditor", "administrator"];
        await PostAsync(service, "api/v1/accounts/first", new { roles }, cancellationToken);
        JsonElement made = await PostAsync(service, "api/v1/tokens", new { name = "test", roles, expiresInDays = 1 }, cancellationToken);
        return made.GetProperty("value").GetString()!;
    }

    /// <summary>Lets the client send a token from now on.</summary>
    public static void UseToken(this LabWatchProcess service, string token) =>
        service.Client.DefaultRequestHeaders.Authorization = new AuthenticationHeaderValue("Bearer", token);

    /// <summary>Posts JSON and gives the answer's JSON; fails where the answer is a refusal.</summary>
    public static async Task<JsonElement> PostAsync(this LabWatchProcess service, string path, object body, CancellationToken cancellationToken)
    {
        using HttpResponseMessage answer = await service.Client.PostAsJsonAsync(path, body, cancellationToken);
        string text = await answer.Content.ReadAsStringAsync(cancellationToken);
        Assert.True(answer.IsSuccessStatusCode, $"{path}: {(int)answer.StatusCode} {text}\n{service.Output}");
        return text.Length == 0 ? default : JsonSerializer.Deserialize<JsonElement>(text);
    }

    [GeneratedRegex(@"^    (?<name>[a-z-]+) +(?<code>[0-9a-z]{5}(-[0-9a-z]{5}){3})  http", RegexOptions.Multiline | RegexOptions.ExplicitCapture)]
    private static partial Regex CodeLine();
}
