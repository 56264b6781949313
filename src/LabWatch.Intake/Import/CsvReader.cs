using System.Text;

namespace LabWatch.Intake.Import;

/// <summary>
/// Reads rows of delimited text (RFC 4180): fields may be quoted, a quote in a quoted field is doubled, and a quoted field may span lines.
/// Beyond the standard: any delimiter, line ends of all systems, and a byte order mark at the start. Bounded: a row longer than the limit is refused.
/// </summary>
internal sealed class CsvReader(TextReader text, char delimiter)
{
    private const int LongestRow = 1 << 20;
    private readonly List<string> _fields = [];
    private readonly StringBuilder _field = new();
    private int _peeked = -2;

    /// <summary>Number of the line on which the row last read begins, from 1.</summary>
    public long Line { get; private set; }

    /// <summary>Number of the line that is read next.</summary>
    private long NextLine { get; set; } = 1;

    /// <summary>Reads the next row; null at the end. Empty lines are passed over. Throws <see cref="InvalidDataException"/> for a row that breaks the grammar; the reader then stands at the next line.</summary>
    public IReadOnlyList<string>? Read()
    {
        while (true)
        {
            Line = NextLine;
            _fields.Clear();
            if (!ReadRow())
            {
                return null;
            }

            if (_fields.Count > 1 || _fields[0].Length > 0)
            {
                return [.. _fields];
            }
        }
    }

    private bool ReadRow()
    {
        if (Peek() < 0)
        {
            return false;
        }

        int length = 0;
        while (true)
        {
            _field.Clear();
            bool more = Peek() == '"' ? ReadQuoted(ref length) : ReadPlain(ref length);
            _fields.Add(_field.ToString());
            if (!more)
            {
                return true;
            }
        }
    }

    // Both return whether another field follows in the row.
    private bool ReadPlain(ref int length)
    {
        while (true)
        {
            int next = Take();
            if (next == delimiter)
            {
                return true;
            }

            if (IsRowEnd(next))
            {
                return false;
            }

            Add((char)next, ref length);
        }
    }

    private bool ReadQuoted(ref int length)
    {
        Take();
        while (true)
        {
            int next = Take();
            if (next < 0)
            {
                throw new InvalidDataException("A quoted field does not end.");
            }

            if (next == '"')
            {
                if (Peek() != '"')
                {
                    break;
                }

                Take();
            }

            NextLine += next == '\n' ? 1 : 0;
            Add((char)next, ref length);
        }

        int after = Take();
        if (after == delimiter)
        {
            return true;
        }

        if (!IsRowEnd(after))
        {
            SkipLine();
            throw new InvalidDataException("Text follows a quoted field.");
        }

        return false;
    }

    private bool IsRowEnd(int character)
    {
        if (character == '\r' && Peek() == '\n')
        {
            Take();
        }

        bool isEnd = character is '\r' or '\n';
        NextLine += isEnd ? 1 : 0;
        return isEnd || character < 0;
    }

    private void Add(char character, ref int length)
    {
        length++;
        if (length > LongestRow)
        {
            SkipLine();
            throw new InvalidDataException("The row is longer than a million characters.");
        }

        _field.Append(character);
    }

    private void SkipLine()
    {
        int next = Take();
        while (!IsRowEnd(next))
        {
            next = Take();
        }
    }

    private int Peek()
    {
        if (_peeked == -2)
        {
            _peeked = text.Read();
        }

        return _peeked;
    }

    private int Take()
    {
        int taken = Peek();
        _peeked = taken < 0 ? taken : -2;
        return taken;
    }
}
