namespace LabWatch.SystemTests.Service;

public sealed class CommandTests
{
    [Fact]
    public async Task Check_config_lists_all_findings_and_says_so_in_its_exit_code()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory directory = new();
        string lab = directory.At("lab.json");
        await File.WriteAllTextAsync(lab, LabWatch.Tests.Lab.LabFileSample.Text.Replace("\"UTC\"", "\"Nowhere/Land\"", StringComparison.Ordinal).Replace("\"stirred-bath\"", "\"kettle\"", StringComparison.Ordinal), token);

        (int exitCode, string output) = await LabWatchProcess.RunAsync(["check-config", "--lab", lab], token, new Dictionary<string, string> { ["LABWATCH__Intake__QueueLimit"] = "7", ["LABWATCH__Alerts__Nonsense"] = "1" });

        Assert.Equal(2, exitCode);
        Assert.Contains("/site/timeZone", output, StringComparison.Ordinal);
        Assert.Contains("/sources/0/kind", output, StringComparison.Ordinal);
        Assert.Contains("Intake:QueueLimit", output, StringComparison.Ordinal);
        Assert.Contains("Alerts:Nonsense", output, StringComparison.Ordinal);
        Assert.Contains("4 finding(s)", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Serve_without_a_lab_file_says_what_to_do()
    {
        using TemporaryDirectory directory = new();
        (int exitCode, string output) = await LabWatchProcess.RunAsync(["serve", "--data", directory.At("data")], TestContext.Current.CancellationToken);

        Assert.Equal(2, exitCode);
        Assert.Contains("--lab FILE", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_data_directory_serves_one_process_and_a_taken_port_is_named()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        await using ServiceFixture fixture = new();
        await fixture.StartAsync(token);

        (int exitCode, string output) = await LabWatchProcess.RunAsync(["serve", "--data", fixture.Data], token);
        Assert.Equal(2, exitCode);
        Assert.Contains("Another LabWatch is using this data directory", output, StringComparison.Ordinal);

        using TemporaryDirectory other = new();
        (exitCode, output) = await LabWatchProcess.RunAsync(
            ["demo", "--days", "0", "--data", other.At("data"), "--mqtt-port", $"{LabWatchProcess.FreePort()}", "--urls", fixture.Service.Address.GetLeftPart(UriPartial.Authority)], token);
        Assert.Equal(2, exitCode);
        Assert.Contains("--urls", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_demo_goes_on_where_it_was()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory data = new();
        string[] arguments = ["demo", "--data", data.At("demo"), "--days", "0", "--mqtt-port", $"{LabWatchProcess.FreePort()}"];
        string digest;
        await using (LabWatchProcess first = LabWatchProcess.Start(arguments))
        {
            await first.WaitUntilReadyAsync(token);
            digest = await File.ReadAllTextAsync(data.At("demo", "lab-in-force.json"), token);
            Assert.Equal(0, await first.StopAsync(token));
            Assert.Contains($"Open  {first.Address.GetLeftPart(UriPartial.Authority)}", first.Output, StringComparison.Ordinal);
        }

        await using LabWatchProcess second = LabWatchProcess.Start(arguments);
        await second.WaitUntilReadyAsync(token);
        Assert.Equal(digest, await File.ReadAllTextAsync(data.At("demo", "lab-in-force.json"), token));
    }

    [Fact]
    public async Task Recompute_says_what_can_not_be_computed_again_and_which_sources_there_are()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory data = new();
        (int exitCode, string output) = await LabWatchProcess.RunAsync(["recompute", "--data", data.At("none")], token);
        Assert.Equal(2, exitCode);
        Assert.Contains("There is no such data directory", output, StringComparison.Ordinal);

        // Assessments and readings that were written apart: none of the assessments has the readings that it says.
        await Evidence.TrialData.MakeAsync(data.Path, token);
        (exitCode, output) = await LabWatchProcess.RunAsync(["recompute", "--data", data.Path, "--criterion", "stability"], token);
        Assert.True(exitCode == 3, output);
        Assert.Matches(@"stability +60 (not possible|rest on other inputs)", output);
        Assert.Contains("60 assessments computed again", output, StringComparison.Ordinal);

        (exitCode, output) = await LabWatchProcess.RunAsync(["recompute", "--data", data.Path, "--source", "birch"], token);
        Assert.Equal(2, exitCode);
        Assert.Contains("The sources are:", output, StringComparison.Ordinal);
    }
}
