using System.ComponentModel;
using System.Diagnostics;
using LabWatch.Evidence.Verification;
using LabWatch.Records;
using Microsoft.Data.Sqlite;

namespace LabWatch.SystemTests.Evidence;

/// <summary>The script of docs/reference/trail.md, as it stands there, checks a chain without any code of ours.</summary>
public sealed class ChainScriptTests : IDisposable
{
    private const string Fence = "```";

    private readonly TemporaryDirectory _data = new();

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public void Dispose() => _data.Dispose();

    [Fact]
    public async Task The_documented_script_gives_the_digests_that_the_service_wrote()
    {
        await TrialData.MakeAsync(_data.Path, Token);
        await File.WriteAllTextAsync(_data.At("chain.py"), Script(), Token);
        (VerifyReport? report, _) = DataVerifier.Run(new VerifyRequest(_data.Path, RecordsOptions.InDirectory(_data.Path), []));
        (int code, string output) = await RunAsync();
        Assert.Equal(0, code);
        Assert.Equal(
            report!.Heads.Select(head => $"{head.Key} {head.Value.Sequence}:{head.Value.Digest}").Order(StringComparer.Ordinal),
            output.Split('\n', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries).Order(StringComparer.Ordinal));

        Execute("DROP TRIGGER audit_entries_refuse_update; UPDATE audit_entries SET actor = 'nobody' WHERE sequence = 7");
        (code, output) = await RunAsync();
        Assert.Equal(1, code);
        Assert.Contains(" 7\n", output.ReplaceLineEndings("\n"), StringComparison.Ordinal);
    }

    private static string Script()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "LabWatch.sln")))
        {
            folder = folder.Parent;
        }

        string page = File.ReadAllText(Path.Combine(folder!.FullName, "docs", "reference", "trail.md"));
        int start = page.IndexOf(Fence + "python", StringComparison.Ordinal) + Fence.Length + "python".Length;
        return page[start..page.IndexOf(Fence, start, StringComparison.Ordinal)];
    }

    private async Task<(int Code, string Output)> RunAsync()
    {
        try
        {
            using Process python = Process.Start(new ProcessStartInfo("python3", [_data.At("chain.py"), _data.At("records.db")]) { RedirectStandardOutput = true })!;
            string output = await python.StandardOutput.ReadToEndAsync(Token);
            await python.WaitForExitAsync(Token);
            return (python.ExitCode, output);
        }
        catch (Win32Exception)
        {
            Assert.Skip("There is no python3 on this machine.");
            throw;
        }
    }

    private void Execute(string sql)
    {
        using SqliteConnection connection = new($"Data Source={_data.At("records.db")};Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }
}
