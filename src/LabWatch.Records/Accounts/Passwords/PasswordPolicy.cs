using System.Globalization;
using System.Text;
using LabWatch.Lab.Findings;

namespace LabWatch.Records.Accounts.Passwords;

/// <summary>
/// Which passwords may be chosen: NIST SP 800-63B-4 (2025), 3.1.1.2, cited from memory. At least 15 characters, as the password is the only
/// factor; long ones taken; every character of Unicode and spaces taken, NFC before hashing; no rules of composition, no change by the
/// calendar, no hints; none that is common, expected or made of words of its context.
/// </summary>
public sealed class PasswordPolicy
{
    /// <summary>Fewest characters (code points).</summary>
    public const int Fewest = 15;

    /// <summary>Most characters: more than the 64 that must be taken at least, and few enough to hash at once.</summary>
    public const int Most = 256;

    /// <summary>zxcvbn's estimate must be at least this: 10^8 guesses.</summary>
    private const int LeastScore = 3;

    /// <summary>zxcvbn's time grows steeply with the length; what stands after this many characters only adds to a password.</summary>
    private const int Estimated = 64;

    /// <summary>Characters that must be left when the words of the context are taken out.</summary>
    private const int LeastBesidesContext = 8;

    private static readonly string[] OwnWords = ["labwatch", "lab", "watch", "password", "passphrase", "laboratory", "blackbody", "calibration"];

    private static readonly Lazy<Zxcvbn.Zxcvbn> Estimator = new(() => new Zxcvbn.Zxcvbn());

    /// <summary>The form in which a password is hashed and compared.</summary>
    public static string Normalise(string password)
    {
        ArgumentNullException.ThrowIfNull(password);
        return Nfc.Compose(password);
    }

    /// <summary>What is wrong with a new password; empty where it may be taken.</summary>
    /// <param name="password">The password.</param>
    /// <param name="where">Where it was given, for the finding.</param>
    /// <param name="context">Words that are expected: names of the account, of the person, of the site.</param>
    public static IReadOnlyList<Finding> Check(string? password, string where, IEnumerable<string> context)
    {
        ArgumentNullException.ThrowIfNull(context);
        if (string.IsNullOrEmpty(password))
        {
            return [new Finding("missing", where, "The password is missing.", null, "Choose one of at least 15 characters.")];
        }

        if (!IsText(password))
        {
            return [new Finding("not-a-password", where, "The password is no text.", null, "Use letters, digits, signs and spaces of any language.")];
        }

        string text = Normalise(password);
        int characters = text.EnumerateRunes().Count();
        if (characters < Fewest)
        {
            return [new Finding("password-too-short", where, string.Create(CultureInfo.InvariantCulture, $"The password has {characters} characters; {Fewest} are the fewest."), null, "Several words that do not belong together are long and easy to keep in mind.")];
        }

        if (characters > Most)
        {
            return [new Finding("password-too-long", where, string.Create(CultureInfo.InvariantCulture, $"The password has more than {Most} characters."), null, "Choose a shorter one.")];
        }

        string[] words = [.. OwnWords.Concat(context.SelectMany(Words)).Distinct(StringComparer.Ordinal).OrderByDescending(word => word.Length)];
        return IsExpected(text, words) || IsCommon(text, words)
            ? [new Finding("password-expected", where, "The password is common or easy to guess: well-known passwords, names, rows of keys, repetitions, or words that belong to this account and service.", null, "Choose several words that do not belong together, or let a password manager make one.")]
            : [];
    }

    private static bool IsText(string password) => password.EnumerateRunes().All(rune => rune != Rune.ReplacementChar && !Rune.IsControl(rune));

    private static bool IsExpected(string text, string[] words)
    {
        string left = text.ToLowerInvariant();
        foreach (string word in words)
        {
            left = left.Replace(word, string.Empty, StringComparison.Ordinal);
        }

        int count = left.Count(char.IsLetter);
        return left.Length != text.Length && count < LeastBesidesContext;
    }

    private static bool IsCommon(string text, string[] words) =>
        Estimator.Value.EvaluatePassword(text.Length > Estimated ? text[..Estimated] : text, words).Score < LeastScore;

    private static IEnumerable<string> Words(string name) =>
        name.ToLowerInvariant().Split([' ', '-', '_', '.', ',', '\''], StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries).Where(word => word.Length >= 3);
}
