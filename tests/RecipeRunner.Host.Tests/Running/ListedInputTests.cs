using System.Text.Json;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Tests.Support;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Running;

/// <summary>Inputs may be named by digest and size instead of being copied into the study.</summary>
public sealed class ListedInputTests : IDisposable
{
    private const string Recipe = "Write(Read(\"a.txt\").Join(Read(\"big.txt\")), \"tables/ab.txt\");";
    private readonly Workbench bench = new();

    public ListedInputTests() => bench.WriteData("big.txt", new string('x', 1000));

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Large_inputs_are_listed_and_small_ones_are_held()
    {
        bench.Run(Recipe, listAbove: 100);

        File.Exists(Path.Combine(bench.Study, "data/inputs/a.txt")).ShouldBeTrue();
        File.Exists(Path.Combine(bench.Study, "data/inputs/big.txt")).ShouldBeFalse();
        using var audit = JsonDocument.Parse(File.ReadAllBytes(Path.Combine(bench.Study, "data/audit.json")));
        var inputs = audit.RootElement.GetProperty("inputs").EnumerateArray().ToArray();
        inputs.Select(input => input.GetProperty("held").GetBoolean()).ShouldBe([true, false]);
        inputs[1].GetProperty("bytes").GetInt64().ShouldBe(1000);
        File.ReadAllText(Path.Combine(bench.Study, "data/ro-crate-metadata.json")).ShouldContain("#listed/big.txt");
    }

    [Fact]
    public void A_limit_is_the_largest_size_that_is_copied()
    {
        bench.Run(Recipe, listAbove: 1000);
        File.Exists(Path.Combine(bench.Study, "data/inputs/big.txt")).ShouldBeTrue();

        bench.Run(Recipe, listAbove: 0, replace: true);
        Directory.Exists(Path.Combine(bench.Study, "data/inputs")).ShouldBeFalse();
    }

    [Fact]
    public void A_listed_file_that_changes_while_the_recipe_runs_is_refused()
    {
        var path = Path.Combine(bench.DataFolder, "big.txt");
        var refused = Should.Throw<RefusedException>(() =>
            bench.Run(
                $"var big = Read(\"big.txt\"); System.IO.File.AppendAllText(\"{path}\", \"y\"); Write(big, \"tables/b.txt\");",
                listAbove: 100
            )
        );

        refused.Problems[0].Code.ShouldBe("RR0124");
        bench.Leftovers().ShouldBeEmpty();
    }

    [Fact]
    public void A_rerun_asks_for_the_data_and_is_identical_with_them()
    {
        bench.Run(Recipe, listAbove: 100);

        bench.Rerun().Problems[0].Code.ShouldBe("RR0835");
        bench.Rerun(data: bench.DataFolder).Verdict.ShouldBe(Verdict.Identical);
    }

    [Fact]
    public void A_rerun_refuses_data_that_are_not_those_of_the_study()
    {
        bench.Run(Recipe, listAbove: 100);
        bench.WriteData("big.txt", new string('x', 999) + "y");
        bench.Rerun(data: bench.DataFolder).Problems.Select(problem => problem.Code).ShouldBe(["RR0837"]);

        File.Delete(Path.Combine(bench.DataFolder, "a.txt"));
        bench.Rerun(data: bench.DataFolder).Problems.Select(problem => problem.Code).ShouldBe(["RR0836", "RR0837"]);
    }
}
