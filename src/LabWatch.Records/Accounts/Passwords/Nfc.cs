using System.Collections.Frozen;
using System.Globalization;
using System.Text;

namespace LabWatch.Records.Accounts.Passwords;

/// <summary>
/// Normalization form C (Unicode Standard Annex #15). The runtime's own needs a library of the operating system that the service is
/// built without, and would then leave a text as it is: the same password typed on two keyboards would be two passwords. Characters that
/// are assigned keep their normalization in later versions of Unicode, so the table need not grow for stored hashes to stay right.
/// </summary>
internal static class Nfc
{
    // Hangul is computed (The Unicode Standard, 3.12).
    private const int SyllableBase = 0xAC00;
    private const int LeadBase = 0x1100;
    private const int VowelBase = 0x1161;
    private const int TailBase = 0x11A7;
    private const int Leads = 19;
    private const int Vowels = 21;
    private const int Tails = 28;
    private const int Syllables = Leads * Vowels * Tails;

    private static readonly Lazy<Tables> Data = new(Read);

    /// <summary>The composed form of a text without lone surrogates.</summary>
    public static string Compose(string text) => Ascii.IsValid(text) ? text : Text(Composed(Decomposed(text)));

    private static List<int> Decomposed(string text)
    {
        List<int> all = new(text.Length);
        foreach (Rune rune in text.EnumerateRunes())
        {
            Decompose(rune.Value, all);
        }

        Reorder(all);
        return all;
    }

    private static void Decompose(int character, List<int> all)
    {
        int syllable = character - SyllableBase;
        if (syllable is >= 0 and < Syllables)
        {
            all.Add(LeadBase + (syllable / (Vowels * Tails)));
            all.Add(VowelBase + (syllable % (Vowels * Tails) / Tails));
            if (syllable % Tails > 0)
            {
                all.Add(TailBase + (syllable % Tails));
            }
        }
        else if (Data.Value.Decompositions.TryGetValue(character, out int[]? parts))
        {
            foreach (int part in parts)
            {
                Decompose(part, all);
            }
        }
        else
        {
            all.Add(character);
        }
    }

    // Marks after a base stand in the order of their classes; those of one class keep theirs.
    private static void Reorder(List<int> all)
    {
        for (int i = 1; i < all.Count; i++)
        {
            int kind = Class(all[i]);
            for (int j = i; kind > 0 && j > 0 && Class(all[j - 1]) > kind; j--)
            {
                (all[j - 1], all[j]) = (all[j], all[j - 1]);
            }
        }
    }

    private static List<int> Composed(List<int> parts)
    {
        List<int> all = new(parts.Count);
        int starter = -1;
        int last = -1;
        foreach (int part in parts)
        {
            int kind = Class(part);
            if (starter >= 0 && (last < kind || last == -1) && Pair(all[starter], part) is { } joined)
            {
                all[starter] = joined;
                continue;
            }

            if (kind == 0)
            {
                starter = all.Count;
            }

            // No mark has come between the starter and the next character yet.
            last = kind == 0 ? -1 : kind;
            all.Add(part);
        }

        return all;
    }

    private static int? Pair(int first, int second)
    {
        int lead = first - LeadBase;
        int vowel = second - VowelBase;
        if (lead is >= 0 and < Leads && vowel is >= 0 and < Vowels)
        {
            return SyllableBase + (((lead * Vowels) + vowel) * Tails);
        }

        int syllable = first - SyllableBase;
        int tail = second - TailBase;
        if (syllable is >= 0 and < Syllables && syllable % Tails == 0 && tail is > 0 and < Tails)
        {
            return first + tail;
        }

        return Data.Value.Compositions.TryGetValue((first, second), out int joined) ? joined : null;
    }

    private static int Class(int character) => Data.Value.Classes.GetValueOrDefault(character);

    private static string Text(List<int> characters)
    {
        StringBuilder text = new(characters.Count);
        Span<char> units = stackalloc char[2];
        foreach (int character in characters)
        {
            text.Append(units[..new Rune(character).EncodeToUtf16(units)]);
        }

        return text.ToString();
    }

    private static Tables Read()
    {
        Dictionary<int, int[]> decompositions = [];
        Dictionary<(int, int), int> compositions = [];
        Dictionary<int, int> classes = [];
        using StreamReader reader = new(typeof(Nfc).Assembly.GetManifestResourceStream("LabWatch.Records.Nfc.data.txt")!);
        while (reader.ReadLine() is { } line)
        {
            if (line[0] == '#')
            {
                continue;
            }

            if (line.Split('=') is [string character, string parts])
            {
                int[] pieces = [.. parts.TrimEnd('!').Split('+').Select(Hex)];
                decompositions[Hex(character)] = pieces;
                if (!parts.EndsWith('!'))
                {
                    compositions[(pieces[0], pieces[1])] = Hex(character);
                }
            }
            else if (line.Split(':') is [string range, string kind])
            {
                string[] ends = range.Split('-');
                for (int c = Hex(ends[0]); c <= Hex(ends[1]); c++)
                {
                    classes[c] = int.Parse(kind, CultureInfo.InvariantCulture);
                }
            }
        }

        return new Tables(decompositions.ToFrozenDictionary(), compositions.ToFrozenDictionary(), classes.ToFrozenDictionary());
    }

    private static int Hex(string text) => int.Parse(text, NumberStyles.HexNumber, CultureInfo.InvariantCulture);

    private sealed record Tables(FrozenDictionary<int, int[]> Decompositions, FrozenDictionary<(int First, int Second), int> Compositions, FrozenDictionary<int, int> Classes);
}
