using LabWatch.Lab.Identity;

namespace LabWatch.Evidence.Verification;

/// <summary>A database of sealed source-hours, opened for reading alone, as the bytes that lie in it.</summary>
internal interface ISealedParts : IDisposable
{
    /// <summary>The sources by their number.</summary>
    /// <param name="damage">Why not all could be read; null where all was.</param>
    Dictionary<long, SourceKey> Sources(out string? damage);

    /// <summary>Every sealed part without its bytes, in the order of sealing.</summary>
    /// <param name="damage">Why not all could be read; null where all was.</param>
    /// <param name="odd">Rows that hold values of another kind than they were written with.</param>
    List<StoredPart> Parts(out string? damage, out List<long> odd);

    /// <summary>Numbers of the parts that have a summary.</summary>
    /// <param name="damage">Why not all could be read; null where all was.</param>
    HashSet<long> Summaries(out string? damage);

    /// <summary>The bytes of a part, or of its summary; null where there are none. Throws <c>UnreadableException</c>.</summary>
    byte[]? Data(string table, string key, long id);
}
