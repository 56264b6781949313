namespace LabWatch.Service.Hosting;

/// <summary>A lab file that a start or a command was given.</summary>
/// <param name="Document">The file, UTF-8.</param>
/// <param name="FileName">Name of the file.</param>
/// <param name="Author">Who gives it.</param>
internal sealed record LabOrder(ReadOnlyMemory<byte> Document, string FileName, string Author)
{
    /// <summary>Why; null where nothing was said.</summary>
    public string? Reason { get; init; }

    /// <summary>Whether the file may revert edits and withdraw what it does not have.</summary>
    public bool Accept { get; init; }

    /// <summary>Whether it is taken only where nothing is known yet.</summary>
    public bool IsFirst { get; init; }

    /// <summary>Whoever runs this program, in a form that no account has.</summary>
    public static string WhoRunsThis => "os/" + (Environment.UserName.Length > 0 ? Environment.UserName : "unknown");
}
