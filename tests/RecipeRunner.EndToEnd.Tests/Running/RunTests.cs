using System.Text.RegularExpressions;

namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>A run as a technician meets it in a terminal.</summary>
public sealed partial class RunTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    [Fact]
    public void A_run_ends_with_what_a_person_wants_to_know()
    {
        var lines = demo.Said.Output.Split('\n');

        lines[0].ShouldBe("Quellmark: rain by month and water year, October 2022 to September 2024");
        lines.ShouldContain(line =>
            line.StartsWith("  read       basins.shp", StringComparison.Ordinal)
            && line.Contains("6 basins, 2,887 km², EPSG:25833", StringComparison.Ordinal)
        );
        lines.ShouldContain("gauges     20 with weight, 2 without (Q-21, Q-22)");
        lines.ShouldContain(line => StudyLine().IsMatch(line));
        lines.ShouldContain(line => line.StartsWith("withheld", StringComparison.Ordinal));
        demo.Said.Errors.ShouldBe("");
    }

    [Fact]
    public void Coreutils_alone_verify_the_bag()
    {
        using var tool = new Tool();
        var check = tool.Command(
            "bash",
            "-c",
            $"cd '{demo.Folder}' && sha256sum -c --quiet --strict manifest-sha256.txt && sha256sum -c --quiet --strict tagmanifest-sha256.txt"
        );

        check.ExitCode.ShouldBe(0, check.Output + check.Errors);
    }

    [Fact]
    public void The_recipe_inside_a_study_makes_the_same_study_again()
    {
        using var tool = new Tool();
        var again = tool.Run(
            "run",
            demo.PathOf("recipe/monthly-totals.csx"),
            "--data",
            demo.PathOf("inputs"),
            "--into",
            "again.study",
            "--quiet"
        );

        again.ShouldBe(new Said(0, "again.study\n", ""));
        SameButForTheRun(tool.PathOf("again.study")).ShouldBeEmpty();
    }

    [Fact]
    public void Locale_time_zone_and_colour_settings_change_no_byte()
    {
        using var tool = new Tool();
        var abroad = tool.Run(
            [
                ("LC_ALL", "de_DE.UTF-8"),
                ("TZ", "Pacific/Kiritimati"),
                ("DOTNET_PROCESSOR_COUNT", "1"),
                ("NO_COLOR", "1"),
            ],
            "run",
            DemoStudy.Recipe("monthly-totals"),
            "--data",
            DemoStudy.Data
        );

        abroad.ExitCode.ShouldBe(0, abroad.Errors);
        SameButForTheRun(tool.PathOf("monthly-totals.study")).ShouldBeEmpty();
    }

    [Theory]
    [InlineData("one-storm")]
    [InlineData("wet-days")]
    public void Every_recipe_runs(string recipe)
    {
        using var tool = new Tool();
        var said = tool.Run("run", DemoStudy.Recipe(recipe), "--data", DemoStudy.Data);

        said.ExitCode.ShouldBe(0, said.Errors);
        File.Exists(tool.PathOf($"{recipe}.study/data/summary.html")).ShouldBeTrue();
    }

    [Fact]
    public void A_setting_given_changes_the_study_and_an_unknown_one_is_refused()
    {
        using var tool = new Tool();
        tool.Run("run", DemoStudy.Recipe("wet-days"), "--data", DemoStudy.Data, "--set", "wet-from-mm=10")
            .ExitCode.ShouldBe(0);
        File.ReadAllText(tool.PathOf("wet-days.study/data/summary.html"))
            .ShouldContain("days with a value had 10 mm or more");

        var refused = tool.Run(
            "run",
            DemoStudy.Recipe("wet-days"),
            "--data",
            DemoStudy.Data,
            "--set",
            "wet-from=10",
            "--into",
            "other.study"
        );
        refused.ExitCode.ShouldBe(1);
        refused.Errors.ShouldContain("Did you mean wet-from-mm?");
        refused.Errors.ShouldEndWith("nothing was written\n");
        Directory.Exists(tool.PathOf("other.study")).ShouldBeFalse();
    }

    [Theory]
    [InlineData("INT")]
    [InlineData("TERM")]
    public void A_run_that_is_interrupted_leaves_nothing(string signal)
    {
        using var tool = new Tool();
        var recipe = tool.Write(
            "slow.csx",
            "for (var i = 0; i < 100000; i++) { ReadGauges(\"gauges.csv\", id: \"gauge\", x: \"lon\", y: \"lat\", crs: Crs(\"EPSG:4326\")); }"
        );
        var copied = tool.PathOf("slow.study.making/study/data/inputs/gauges.csv");
        var said = tool.RunAndInterrupt(signal, () => File.Exists(copied), "run", recipe, "--data", DemoStudy.Data);

        said.ExitCode.ShouldBe(130);
        said.Errors.ShouldContain("nothing was written");
        Directory.EnumerateFileSystemEntries(tool.Folder).Select(Path.GetFileName).ShouldBe(["slow.csx"]);
    }

    [Theory]
    [InlineData("run")]
    [InlineData("fly")]
    [InlineData("run x.csx --set year")]
    [InlineData("run x.csx --frobnicate")]
    [InlineData("run x.csx --inputs some")]
    [InlineData("run x.csx --listed-above 5")]
    [InlineData("run x.csx --inputs listed --listed-above=-1")]
    public void What_is_not_understood_is_wrong_usage(string arguments)
    {
        using var tool = new Tool();
        var said = tool.Run(arguments.Split(' '));

        said.ExitCode.ShouldBe(2);
        said.Errors.ShouldContain("--help");
    }

    [Fact]
    public void Coincident_gauges_are_refused_by_name_with_the_mend()
    {
        using var tool = new Tool();
        var recipe = tool.Write(
            "twins.csx",
            "var gauges = ReadGauges(\"gauges-coincident.csv\", id: \"gauge\", x: \"lon\", y: \"lat\", crs: Crs(\"EPSG:4326\"))\n    .To(Crs(\"EPSG:32633\"));\nvar cells = gauges.ThiessenCells();\n"
        );
        var said = tool.Run("run", recipe, "--data", Path.Combine(DemoStudy.Data, "awkward"));

        said.ExitCode.ShouldBe(1);
        said.Errors.ShouldContain($"{recipe}(3,13): error RR0402: gauges-coincident.csv, gauges Q-07 and Q-23");
        said.Errors.ShouldContain("   3 | var cells = gauges.ThiessenCells();");
        said.Errors.ShouldContain(".Without(\"Q-23\")");
    }

    [Fact]
    public void A_place_that_cannot_be_written_is_told_without_a_stack_trace()
    {
        using var tool = new Tool();
        var said = tool.Run("run", DemoStudy.Recipe("one-storm"), "--data", DemoStudy.Data, "--into", "/proc/x.study");

        said.ExitCode.ShouldBe(1);
        said.Errors.ShouldStartWith("error RR0704: ");
        said.Errors.ShouldNotContain("   at ");
    }

    [Fact]
    public void A_check_reports_without_running()
    {
        using var tool = new Tool();
        tool.Run("check", DemoStudy.Recipe("one-storm")).ExitCode.ShouldBe(0);
        var bad = tool.Run("check", tool.Write("bad.csx", "var a = Crs(4326);\nvar b = Craters();\n"));

        bad.ExitCode.ShouldBe(1);
        bad.Errors.ShouldContain("bad.csx(1,13): error CS1503");
        bad.Errors.ShouldContain("bad.csx(2,9): error CS0103");
    }

    [Fact]
    public void Steps_lists_every_verb_and_shows_one_with_an_example()
    {
        using var tool = new Tool();
        var all = tool.Run("steps");
        foreach (
            var verb in (string[])
                [
                    "ReadBasins",
                    "ReadGauges",
                    "ReadRecords",
                    "To",
                    "ThiessenCells",
                    "Triangulate",
                    "WeighBy",
                    "CutTo",
                    "MeanRain",
                    "Total",
                    "Coverage",
                    "ComparePolicies",
                    "Storms",
                    "AnnualMaxima",
                    "DepthArea",
                    "ToDays",
                    "SpreadAccumulations",
                    "And",
                    "With",
                    "EmitLayer",
                    "EmitTable",
                    "Crs",
                    "Setting",
                    "Title",
                    "Note",
                    "Source",
                ]
        )
        {
            all.Output.ShouldContain($"\n  {verb} ");
        }

        var one = tool.Run("steps", "meanrain");
        one.Output.ShouldContain("GapPolicy.Redraw");
        one.Output.ShouldContain("AtLeast.Gauges(…)");
        one.Output.ShouldContain("var areal = weights.MeanRain(");
        tool.Run("steps", "MeanRian").Errors.ShouldContain("Did you mean MeanRain?");
    }

    [Fact]
    public void Peek_says_what_is_in_each_kind_of_file()
    {
        using var tool = new Tool();
        tool.Run("peek", Path.Combine(DemoStudy.Data, "basins.shp")).Output.ShouldContain("EPSG:25833");
        tool.Run("peek", Path.Combine(DemoStudy.Data, "gauges.csv")).Output.ShouldContain("lon: numbers from");
        tool.Run("peek", Path.Combine(DemoStudy.Data, "daily.csv"))
            .Output.ShouldContain("2022-10-01 to 2024-09-30, 731 steps");
        tool.Run("peek", demo.PathOf("layers/basins.geojson")).Output.ShouldContain("rain_mm");
    }

    [Fact]
    public void The_longest_series_is_counted_in_its_own_steps()
    {
        // hourly-Q-19.csv has a header and 92 days of 24 hours; the 731 days of daily.csv come first.
        using var tool = new Tool();
        var recipe = tool.Write(
            "two.csx",
            """
            var grid = Crs("EPSG:32633");
            var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME").To(grid);
            var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326")).To(grid);
            var weights = basins.WeighBy(gauges.ThiessenCells());
            var daily = ReadRecords("daily.csv", RainUnit.Millimetres, TimeStep.Days(endingAt: "09:00"));
            var hourly = ReadRecords("hourly-Q-19.csv", RainUnit.Millimetres, TimeStep.Hours());
            EmitTable(weights.MeanRain(daily, GapPolicy.Redraw, AtLeast.Gauges(1)), "days");
            EmitTable(weights.MeanRain(hourly, GapPolicy.Redraw, AtLeast.Gauges(1)), "hours");
            """
        );

        var run = tool.Run("run", recipe, "--data", DemoStudy.Data);

        run.Output.ShouldContain("\ntime       2,208 hours, 2 series\n", Case.Sensitive, run.Errors);
    }

    private IEnumerable<string> SameButForTheRun(string other)
    {
        string[] ofTheRun =
        [
            "bag-info.txt",
            "data/ro-crate-metadata.json",
            "data/run.json",
            "manifest-sha256.txt",
            "tagmanifest-sha256.txt",
        ];
        var files = Directory
            .EnumerateFiles(demo.Folder, "*", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(demo.Folder, path))
            .ToArray();
        files.Length.ShouldBeGreaterThan(30);
        return files
            .Except(ofTheRun)
            .Where(file =>
                !File.ReadAllBytes(Path.Combine(demo.Folder, file))
                    .SequenceEqual(File.ReadAllBytes(Path.Combine(other, file)))
            );
    }

    [GeneratedRegex(
        @"^study      monthly-totals\.study \(\d+ files, sealed\), \d+\.\d s$",
        RegexOptions.CultureInvariant,
        1000
    )]
    private static partial Regex StudyLine();
}
