using System.Text;
using System.Text.Json;

namespace LabWatch.Intake.Payloads;

/// <summary>Reads the object of one SenML record. It throws only what <see cref="Utf8JsonReader"/> throws on malformed JSON.</summary>
internal static class SenmlRecordReader
{
    /// <summary>The version of RFC 8428 section 4.4, and lower ones.</summary>
    private const int Version = 10;

    /// <summary>Version 10 with secondary units (RFC 9100 section 2 and RFC 8798).</summary>
    private const int VersionWithSecondaryUnits = 26;

    /// <summary>Reads up to the end of the object that the reader stands on. Returns the code why the whole pack must be refused, else null.</summary>
    public static string? Read(scoped ref Utf8JsonReader reader, ref SenmlRecord record)
    {
        record.StartNext();
        while (reader.Read() && reader.TokenType == JsonTokenType.PropertyName)
        {
            ReadOnlySpan<byte> label = Text(ref reader);
            SenmlFields field = SenmlLabel.Parse(label);
            bool twice = field != SenmlFields.None && (record.Fields & field) != 0;
            record.Fields |= field;
            reader.Read();
            string? refusal = twice ? RefuseTwice(field, label, ref record)
                : field == SenmlFields.None ? Ignore(label, ref record)
                : ReadField(ref reader, field, label, ref record);
            if (refusal is not null)
            {
                return refusal;
            }

            reader.Skip();
        }

        // RFC 8428 section 4.4: all records of a pack have the same version, and it is 10 where none is stated.
        record.Version = record.Version == 0 ? Version : record.Version;
        return null;
    }

    private static string? ReadField(scoped ref Utf8JsonReader reader, SenmlFields field, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        switch (field)
        {
            case SenmlFields.BaseName:
                return ReadText(ref reader, ref record.BaseName, label, ref record) ? null : IntakeCode.WrongType;
            case SenmlFields.BaseUnit:
                return ReadText(ref reader, ref record.BaseUnit, label, ref record) ? null : IntakeCode.WrongType;
            case SenmlFields.BaseTime:
                return ReadTime(ref reader, ref record.BaseTime, label, ref record) ? null : record.Refusal;
            case SenmlFields.BaseValue:
                return ReadNumber(ref reader, ref record.BaseValue, label, ref record) ? null : record.Refusal;
            case SenmlFields.BaseVersion:
                return ReadVersion(ref reader, label, ref record);
            case SenmlFields.Name:
                ReadText(ref reader, ref record.Name, label, ref record);
                break;
            case SenmlFields.Unit:
                ReadText(ref reader, ref record.Unit, label, ref record);
                break;
            case SenmlFields.Time:
                ReadTime(ref reader, ref record.Time, label, ref record);
                break;
            case SenmlFields.Value:
                ReadValue(ref reader, label, ref record);
                break;
            case SenmlFields.BooleanValue:
                ReadBoolean(ref reader, label, ref record);
                break;
            case SenmlFields.StringValue or SenmlFields.DataValue:
                record.Refuse(IntakeCode.ValueNotNumber, label, Shown(ref reader));
                break;
            default:
                double unused = 0;
                ReadNumber(ref reader, ref unused, label, ref record);
                break;
        }

        return null;
    }

    private static string? RefuseTwice(SenmlFields field, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        record.Refuse(IntakeCode.DuplicateLabel, label, label);
        return (field & SenmlFields.Regular) == 0 ? IntakeCode.DuplicateLabel : null;
    }

    private static string? Ignore(ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        if (label.Length > 0 && label[^1] == (byte)'_')
        {
            record.Refuse(IntakeCode.MustUnderstand, label, label);
            return IntakeCode.MustUnderstand;
        }

        return null;
    }

    private static bool ReadText(scoped ref Utf8JsonReader reader, ref ReadOnlySpan<byte> target, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        if (reader.TokenType == JsonTokenType.String)
        {
            target = Text(ref reader);
            return true;
        }

        record.Refuse(IntakeCode.WrongType, label, Shown(ref reader));
        return false;
    }

    private static bool ReadTime(scoped ref Utf8JsonReader reader, ref DecimalSeconds target, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        bool number = reader.TokenType == JsonTokenType.Number;
        if (number && DecimalSeconds.TryParse(reader.ValueSpan, out target))
        {
            return true;
        }

        record.Refuse(number ? IntakeCode.TimeOutOfRange : IntakeCode.WrongType, label, Shown(ref reader));
        return false;
    }

    private static bool ReadNumber(scoped ref Utf8JsonReader reader, ref double target, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        bool number = reader.TokenType == JsonTokenType.Number;
        if (number && reader.TryGetDouble(out target) && double.IsFinite(target))
        {
            return true;
        }

        record.Refuse(number ? IntakeCode.ValueOutOfRange : IntakeCode.WrongType, label, Shown(ref reader));
        return false;
    }

    private static void ReadValue(scoped ref Utf8JsonReader reader, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        if (reader.TokenType != JsonTokenType.Null && ReadNumber(ref reader, ref record.Value, label, ref record))
        {
            record.ValueText = reader.ValueSpan;
        }
    }

    private static void ReadBoolean(scoped ref Utf8JsonReader reader, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        if (reader.TokenType is JsonTokenType.True or JsonTokenType.False)
        {
            record.Value = reader.TokenType == JsonTokenType.True ? 1 : 0;
        }
        else
        {
            record.Refuse(IntakeCode.WrongType, label, Shown(ref reader));
        }
    }

    private static string? ReadVersion(scoped ref Utf8JsonReader reader, ReadOnlySpan<byte> label, ref SenmlRecord record)
    {
        if (reader.TokenType == JsonTokenType.Number
            && reader.TryGetInt32(out int version)
            && (version is > 0 and <= Version || version == VersionWithSecondaryUnits))
        {
            bool differs = record.Version != 0 && record.Version != version;
            record.Version = version;
            if (differs)
            {
                record.Refuse(IntakeCode.VersionDiffers, label, Shown(ref reader));
            }

            return differs ? IntakeCode.VersionDiffers : null;
        }

        record.Refuse(IntakeCode.UnknownVersion, label, Shown(ref reader));
        return IntakeCode.UnknownVersion;
    }

    /// <summary>The bytes of a name or text; copied only where it holds escapes. Throws <see cref="InvalidOperationException"/> on a lone surrogate.</summary>
    private static ReadOnlySpan<byte> Text(scoped ref Utf8JsonReader reader) =>
        reader.ValueIsEscaped ? Encoding.UTF8.GetBytes(reader.GetString()!) : reader.ValueSpan;

    private static ReadOnlySpan<byte> Shown(scoped ref Utf8JsonReader reader) =>
        reader.TokenType switch
        {
            JsonTokenType.StartObject => "{...}"u8,
            JsonTokenType.StartArray => "[...]"u8,
            JsonTokenType.Null => "null"u8,
            _ => reader.ValueSpan,
        };
}
