using LabWatch.Metrology.Tests.Checks;
using Xunit;

namespace LabWatch.Metrology.Tests.Validation;

public sealed class ValidationPageTests
{
    private const int ComputedColumn = 4;
    private const int UsedColumn = 6;

    [Fact]
    public void Page_lists_every_check_as_it_is()
    {
        string path = Path.Combine(RepositoryRoot(), "docs", "validation.md");
        string page = ValidationPage.Write(CheckSuites.All);
        if (Environment.GetEnvironmentVariable("LABWATCH_WRITE_DOCS") == "1")
        {
            File.WriteAllText(path, page);
        }

        string[] expected = [.. page.Split('\n').Select(Comparable)];
        string[] found = [.. File.ReadAllText(path).ReplaceLineEndings("\n").Split('\n').Select(Comparable)];
        Assert.True(
            expected.SequenceEqual(found),
            $"docs/validation.md is out of date, first at: {expected.Except(found).FirstOrDefault() ?? found.Except(expected).FirstOrDefault()}."
            + " Run the tests with LABWATCH_WRITE_DOCS=1 and commit it.");
    }

    [Fact]
    public void Ids_are_unique_in_each_suite()
    {
        Assert.All(CheckSuites.All, suite => Assert.Equal(suite.Checks.Count, suite.Checks.DistinctBy(check => check.Id).Count()));
    }

    /// <summary>A line without what may differ in its last digit between platforms; that every value is met, the tests of the suites say.</summary>
    private static string Comparable(string line)
    {
        string[] cells = line.Split(" | ");
        return cells.Length < 8 ? line : string.Join(" | ", cells.Where((_, i) => i is not (ComputedColumn - 1) and not (UsedColumn - 1)));
    }

    private static string RepositoryRoot()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "LabWatch.sln")))
        {
            folder = folder.Parent;
        }

        return folder?.FullName ?? throw new InvalidOperationException("The tests do not run inside the repository.");
    }
}
