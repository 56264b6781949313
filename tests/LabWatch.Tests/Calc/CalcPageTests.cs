using LabWatch.Service.Calc;

namespace LabWatch.Tests.Calc;

public sealed class CalcPageTests
{
    [Fact]
    public void Page_describes_the_calculators_as_they_are()
    {
        string path = Path.Combine(RepositoryRoot(), "docs", "reference", "calc.md");
        string page = CalcPage.Write(Calculators.All);
        if (Environment.GetEnvironmentVariable("LABWATCH_WRITE_DOCS") == "1")
        {
            File.WriteAllText(path, page);
        }

        Assert.True(
            page == File.ReadAllText(path).ReplaceLineEndings("\n"),
            "docs/reference/calc.md is out of date: run the tests with LABWATCH_WRITE_DOCS=1 and commit it.");
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
