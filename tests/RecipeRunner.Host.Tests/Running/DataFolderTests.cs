using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Running;

/// <summary>A recipe reads only below its data folder.</summary>
public sealed class DataFolderTests : IDisposable
{
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData("../secret.txt")]
    [InlineData("/etc/hostname")]
    [InlineData("sub/../../secret.txt")]
    [InlineData("sub\\\\a.txt")]
    [InlineData("link.txt")]
    [InlineData("linked/secret.txt")]
    [InlineData("./a.txt")]
    [InlineData("")]
    public void Names_that_lead_out_are_refused(string name)
    {
        bench.Write("secret.txt", "secret");
        bench.Write("elsewhere/secret.txt", "secret");
        File.CreateSymbolicLink(Path.Combine(bench.DataFolder, "link.txt"), Path.Combine(bench.Folder, "secret.txt"));
        Directory.CreateSymbolicLink(Path.Combine(bench.DataFolder, "linked"), Path.Combine(bench.Folder, "elsewhere"));

        bench.Fail($"Read(\"{name}\");").Problem.Code.ShouldBe("RR0122");
    }

    [Fact]
    public void A_missing_file_offers_the_near_ones()
    {
        bench.WriteData("rain/daily.csv", "x");
        var problem = bench.Fail("Read(\"rain/dialy.csv\");").Problem;

        problem.Code.ShouldBe("RR0120");
        problem.Mend.ShouldContain("rain/daily.csv");
    }

    [Fact]
    public void The_study_holds_what_was_read_byte_for_byte()
    {
        bench.WriteData("sub/c.txt", "gamma");
        var outcome = bench.Run("Read(\"sub/c.txt\");");

        File.ReadAllText(Path.Combine(outcome.StudyFolder, "data/inputs/sub/c.txt")).ShouldBe("gamma");
    }

    [Theory]
    [InlineData("rain/*.csv", "rain/A.csv rain/b.csv rain/b2.csv")]
    [InlineData("rain/b?.csv", "rain/b2.csv")]
    [InlineData("*.txt", "a.txt b.txt")]
    [InlineData("rain/*", "rain/A.csv rain/b.csv rain/b2.csv rain/c.tsv")]
    [InlineData("rain/B*.csv", null)]
    [InlineData("a.txt", "a.txt")]
    public void A_pattern_names_the_files_that_fit_in_ordinal_order(string pattern, string? names)
    {
        foreach (var name in new[] { "b.csv", "A.csv", "b2.csv", "c.tsv", ".hidden.csv", "sub/d.csv" })
        {
            bench.WriteData("rain/" + name, name);
        }

        bench.Write("secret.csv", "secret");
        File.CreateSymbolicLink(
            Path.Combine(bench.DataFolder, "rain/link.csv"),
            Path.Combine(bench.Folder, "secret.csv")
        );
        if (names is null)
        {
            bench.Fail($"List(\"{pattern}\");").Problem.Code.ShouldBe("RR0120");
            return;
        }

        var outcome = bench.Run($"Write(List(\"{pattern}\"), \"tables/names.txt\");");
        File.ReadAllText(Path.Combine(outcome.StudyFolder, "data/tables/names.txt")).ShouldBe(names);
        Directory
            .EnumerateFiles(Path.Combine(outcome.StudyFolder, "data/inputs"), "*", SearchOption.AllDirectories)
            .Count()
            .ShouldBe(names.Split(' ').Length, "only what was read is copied");
    }

    [Theory]
    [InlineData("../*.txt", "RR0122")]
    [InlineData("/etc/*", "RR0122")]
    [InlineData("rain/../../*", "RR0122")]
    [InlineData("linked/*.txt", "RR0122")]
    [InlineData("*/../*.txt", "RR0122")]
    [InlineData("r*/a.csv", "RR0123")]
    [InlineData("*/*.csv", "RR0123")]
    [InlineData("nowhere/*.csv", "RR0120")]
    public void Patterns_that_lead_out_or_to_nothing_are_refused(string pattern, string code)
    {
        bench.Write("elsewhere/secret.txt", "secret");
        Directory.CreateSymbolicLink(Path.Combine(bench.DataFolder, "linked"), Path.Combine(bench.Folder, "elsewhere"));

        bench.Fail($"List(\"{pattern}\");").Problem.Code.ShouldBe(code);
    }
}
