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
}
