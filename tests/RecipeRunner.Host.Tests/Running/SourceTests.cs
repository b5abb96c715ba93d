using System.Text.Json;
using RecipeRunner.Host.Tests.Support;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Running;

/// <summary>A recipe states where its data come from.</summary>
public sealed class SourceTests : IDisposable
{
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Audit_and_page_carry_the_sources_and_what_has_none()
    {
        bench.Run("Source(\"a.*\", \"The <old> letters.\", \"CC0-1.0\"); Read(\"a.txt\"); Read(\"b.txt\");");

        using var audit = JsonDocument.Parse(File.ReadAllBytes(Path.Combine(bench.Study, "data/audit.json")));
        var source = audit.RootElement.GetProperty("sources")[0];
        source.GetProperty("text").GetString().ShouldBe("The <old> letters.");
        source.GetProperty("licence").GetString().ShouldBe("CC0-1.0");
        source.GetProperty("inputs").EnumerateArray().Select(i => i.GetString()).ShouldBe(["inputs/a.txt"]);
        var page = File.ReadAllText(Path.Combine(bench.Study, "data/summary.html"));
        page.ShouldContain("The &lt;old&gt; letters.");
        page.ShouldContain("The recipe states no source of b.txt.");
    }

    [Fact]
    public void A_source_of_a_file_that_is_never_read_is_refused_with_the_near_name()
    {
        var refused = Should.Throw<RefusedException>(() =>
            bench.Run("Source(\"c.txt\", \"Letters.\"); Source(\"sub/a.txt\", \"Letters.\"); Read(\"a.txt\");")
        );

        refused.Problems.Select(problem => problem.Code).ShouldBe(["RR0115", "RR0115"]);
        refused.Problems[0].Mend.ShouldContain("a.txt");
        bench.Leftovers().ShouldBeEmpty();
    }

    [Theory]
    [InlineData("Source(\"a.txt\", \" \");")]
    [InlineData("Source(\"a.txt\", \"Letters.\", \"\");")]
    public void A_source_without_words_is_refused(string recipe) => bench.Fail(recipe).Problem.Code.ShouldBe("RR0114");
}
