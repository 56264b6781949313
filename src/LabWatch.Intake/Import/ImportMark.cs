using System.Globalization;
using System.Security.Cryptography;
using System.Text;

namespace LabWatch.Intake.Import;

/// <summary>
/// How far the import of one file by one order has come, kept in a small file, so that an import that was cut off goes on where it was. To
/// forget it does no harm: readings that are there already change nothing.
/// </summary>
internal sealed class ImportMark(string directory, string digest)
{
    private string Path => System.IO.Path.Combine(directory, digest[..32] + ".line");

    /// <summary>The mark of a file and an order.</summary>
    public static ImportMark Of(string directory, Stream file, ImportOrder order)
    {
        using IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        hash.AppendData(Encoding.UTF8.GetBytes(order.ToString() + string.Join('|', order.Columns)));
        byte[] buffer = new byte[1 << 16];
        for (int read = file.Read(buffer); read > 0; read = file.Read(buffer))
        {
            hash.AppendData(buffer, 0, read);
        }

        return new ImportMark(directory, Convert.ToHexStringLower(hash.GetHashAndReset()));
    }

    /// <summary>Line up to which all was done before; 0 for a beginning.</summary>
    public long Read() =>
        File.Exists(Path) && long.TryParse(File.ReadAllText(Path), NumberStyles.None, CultureInfo.InvariantCulture, out long line) ? line : 0;

    /// <summary>Notes a line.</summary>
    public void Write(long line)
    {
        Directory.CreateDirectory(directory);
        File.WriteAllText(Path + ".new", line.ToString(CultureInfo.InvariantCulture));
        File.Move(Path + ".new", Path, overwrite: true);
    }

    /// <summary>Forgets the mark: the import is done.</summary>
    public void Remove() => File.Delete(Path);
}
