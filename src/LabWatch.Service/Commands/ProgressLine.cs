namespace LabWatch.Service.Commands;

/// <summary>One line on a terminal that says how far a long command has come; nothing where the output goes to a file.</summary>
internal sealed class ProgressLine(TextWriter error) : IDisposable
{
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(200);

    private readonly bool _isTerminal = !Console.IsErrorRedirected;
    private long _last = TimeProvider.System.GetTimestamp();
    private int _shown;

    /// <summary>Tells of what is being gone through, and how many are done.</summary>
    public void Report(string table, long count)
    {
        if (_isTerminal && TimeProvider.System.GetElapsedTime(_last) >= Pause)
        {
            _last = TimeProvider.System.GetTimestamp();
            string line = FormattableString.Invariant($"  {table}: {count:N0}");
            error.Write("\r" + line.PadRight(_shown));
            _shown = line.Length;
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        if (_shown > 0)
        {
            error.Write("\r" + new string(' ', _shown) + "\r");
            _shown = 0;
        }
    }
}
