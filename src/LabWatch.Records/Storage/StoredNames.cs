using LabWatch.Lab.Alerts;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Records.Storage;

/// <summary>Words that stand for enumerations in the database. They belong to the stored format and never change.</summary>
internal static class StoredNames
{
    private static readonly (Decision Value, string Word)[] Decisions =
    [
        (Decision.NotDecided, "not-decided"),
        (Decision.Pass, "pass"),
        (Decision.ConditionalPass, "conditional-pass"),
        (Decision.ConditionalFail, "conditional-fail"),
        (Decision.Fail, "fail"),
    ];

    private static readonly (AlertState Value, string Word)[] AlertStates =
    [
        (AlertState.RaisedUnacknowledged, "raised-unacknowledged"),
        (AlertState.RaisedAcknowledged, "raised-acknowledged"),
        (AlertState.ReturnedUnacknowledged, "returned-unacknowledged"),
        (AlertState.Normal, Normal),
    ];

    private static readonly (AlertPriority Value, string Word)[] Priorities =
        [(AlertPriority.Low, "low"), (AlertPriority.Medium, "medium"), (AlertPriority.High, "high")];

    public const string Normal = "normal";

    public static string Of(Decision decision) => Word(Decisions, decision);

    public static string Of(AlertState state) => Word(AlertStates, state);

    public static string Of(AlertPriority priority) => Word(Priorities, priority);

    public static Decision ReadDecision(string word) => Value(Decisions, word);

    public static AlertState ReadAlertState(string word) => Value(AlertStates, word);

    public static AlertPriority ReadPriority(string word) => Value(Priorities, word);

    private static string Word<T>((T Value, string Word)[] table, T value)
        where T : struct, Enum =>
        Array.Find(table, row => EqualityComparer<T>.Default.Equals(row.Value, value)).Word
            ?? throw new ArgumentOutOfRangeException(nameof(value), value, "The value has no stored word.");

    private static T Value<T>((T Value, string Word)[] table, string word)
        where T : struct, Enum
    {
        int index = Array.FindIndex(table, row => string.Equals(row.Word, word, StringComparison.Ordinal));
        return index >= 0 ? table[index].Value : throw new InvalidDataException($"The records hold the unknown word '{word}'.");
    }
}
