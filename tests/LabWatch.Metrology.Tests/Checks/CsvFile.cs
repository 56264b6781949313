using System.Text;

namespace LabWatch.Metrology.Tests.Checks;

/// <summary>Reads comma-separated values (RFC 4180, quoted fields doubled quotes) with a header line; lines that start with # are comments.</summary>
internal static class CsvFile
{
    /// <summary>The rows of a file in <c>Checks/Data</c>, each by column name.</summary>
    public static IReadOnlyList<IReadOnlyDictionary<string, string>> Read(string fileName)
    {
        string path = Path.Combine(AppContext.BaseDirectory, "Checks", "Data", fileName);
        List<string[]> lines = [.. File.ReadLines(path).Where(line => line.Length > 0 && line[0] != '#').Select(Split)];
        string[] header = lines[0];
        return
        [
            .. lines.Skip(1).Select(fields =>
                (IReadOnlyDictionary<string, string>)header.Zip(fields).ToDictionary(pair => pair.First, pair => pair.Second, StringComparer.Ordinal)),
        ];
    }

    private static string[] Split(string line)
    {
        List<string> fields = [];
        StringBuilder field = new();
        bool quoted = false;
        for (int i = 0; i < line.Length; i++)
        {
            char c = line[i];
            if (quoted && c == '"' && i + 1 < line.Length && line[i + 1] == '"')
            {
                field.Append('"');
                i++;
            }
            else if (c == '"')
            {
                quoted = !quoted;
            }
            else if (c == ',' && !quoted)
            {
                fields.Add(field.ToString());
                field.Clear();
            }
            else
            {
                field.Append(c);
            }
        }

        fields.Add(field.ToString());
        return [.. fields];
    }
}
