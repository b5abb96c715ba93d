using System.Globalization;

namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>The agency revises its data: what changed, and why did the rain?</summary>
public sealed class CompareTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    [Fact]
    public void A_study_does_not_differ_from_itself()
    {
        var said = demo.Tool.Run("compare", demo.Folder, demo.Folder);

        said.ExitCode.ShouldBe(0, said.Errors);
        said.Output.ShouldStartWith("NO DIFFERENCE");
    }

    /// <summary>
    /// By hand: the depth of Q-08 is revised on 14 January 2024, that of Q-06 is taken away on the 15th, both with weight in B-2,
    /// and Q-11 moves, which changes weights on every day.
    /// </summary>
    [Fact]
    public void Revised_missing_and_moved_are_told_apart_and_add_up()
    {
        using var tool = new Tool();
        var data = tool.PathOf("data");
        tool.Command("cp", "-r", DemoStudy.Data, data).ExitCode.ShouldBe(0);
        Edit(Path.Combine(data, "daily.csv"), "2024-01-14,", cells => cells[8] = "9.9");
        Edit(Path.Combine(data, "daily.csv"), "2024-01-15,", cells => cells[6] = "");
        Edit(Path.Combine(data, "gauges.csv"), "Q-11,", cells => cells[1] = "14.11");
        tool.Run("run", DemoStudy.Recipe("monthly-totals"), "--data", data, "--set", "water-year-starts=9", "--quiet")
            .ExitCode.ShouldBe(0);

        var said = tool.Run(
            "compare",
            demo.Folder,
            "monthly-totals.study",
            "--table",
            "changes.csv",
            "--page",
            "changes.html"
        );

        said.ExitCode.ShouldBe(0, said.Errors);
        said.Output.ShouldStartWith("DIFFERENT");
        said.Output.ShouldContain("input    inputs/daily.csv:");
        said.Output.ShouldContain("setting  water-year-starts: 10 -> 9");
        said.Output.ShouldContain("gauge    Q-11:");
        var rows = File.ReadAllLines(tool.PathOf("changes.csv")).Skip(1).Select(line => line.Split(',')).ToArray();
        foreach (var row in rows)
        {
            var numbers = row.Skip(2).Select(cell => decimal.Parse(cell, CultureInfo.InvariantCulture)).ToArray();
            (numbers[1] - numbers[0]).ShouldBe(numbers[2]);
            (numbers[3] + numbers[4] + numbers[5] + numbers[6]).ShouldBe(numbers[2]);
            numbers[3].ShouldBe(0m, "no setting of the gap policy changed");
        }

        Part(rows, "B-2", "2024-01-14", 8).ShouldNotBe(0m);
        Part(rows, "B-2", "2024-01-15", 7).ShouldNotBe(0m);
        var others = rows.Where(row => row[1] is not ("2024-01-14" or "2024-01-15")).ToArray();
        others.Length.ShouldBeGreaterThan(100);
        others.Select(row => (row[7], row[8])).Distinct().ShouldBe([("0", "0")], "only the gauge moved on other days");
        var page = File.ReadAllText(tool.PathOf("changes.html"));
        page.ShouldContain("licensed professional");
        page.ShouldContain("Weights of the full network");
        tool.Run("compare", demo.Folder, "monthly-totals.study", "--table", "changes.csv")
            .Errors.ShouldContain("RR0840");
    }

    [Fact]
    public void Another_gap_policy_is_the_cause_where_gauges_were_silent()
    {
        using var tool = new Tool();
        var text = File.ReadAllText(DemoStudy.Recipe("monthly-totals"));
        var recipe = tool.Write(
            "monthly-totals.csx",
            text.Replace("GapPolicy.Redraw", "GapPolicy.Rescale", StringComparison.Ordinal)
        );
        tool.Run("run", recipe, "--data", DemoStudy.Data, "--quiet").ExitCode.ShouldBe(0);

        var said = tool.Run("compare", demo.Folder, "monthly-totals.study", "--table", "changes.csv");

        said.Output.ShouldContain("recipe   line 17:");
        var rows = File.ReadAllLines(tool.PathOf("changes.csv")).Skip(1).Select(line => line.Split(',')).ToArray();
        rows.Length.ShouldBeGreaterThan(100);
        rows.Count(row => string.Equals(string.Join(',', row[5..]), row[4] + ",0,0,0", StringComparison.Ordinal))
            .ShouldBe(rows.Length);
    }

    private static decimal Part(string[][] rows, string basin, string step, int column) =>
        decimal.Parse(rows.Single(row => row[0] == basin && row[1] == step)[column], CultureInfo.InvariantCulture);

    private static void Edit(string path, string start, Action<string[]> change)
    {
        var lines = File.ReadAllLines(path);
        var at = Array.FindIndex(lines, line => line.StartsWith(start, StringComparison.Ordinal));
        var cells = lines[at].Split(',');
        change(cells);
        lines[at] = string.Join(',', cells);
        File.WriteAllText(path, string.Join('\n', lines) + "\n");
    }
}
