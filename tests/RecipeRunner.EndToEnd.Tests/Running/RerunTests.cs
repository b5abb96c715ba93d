using System.Security.Cryptography;

namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>An auditor's questions of the demo study: is it whole, does it rerun, what does a number rest on?</summary>
public sealed class RerunTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    [Fact]
    public void A_study_as_it_was_made_reruns_to_the_same_files()
    {
        var before = Digests(demo.Folder);

        var said = demo.Tool.Run("rerun", demo.Folder);

        said.ExitCode.ShouldBe(0, said.Errors);
        said.Output.ShouldStartWith("IDENTICAL");
        Digests(demo.Folder).ShouldBe(before, "a rerun writes nothing into the study");
    }

    [Theory]
    [InlineData("data/inputs/daily.csv")]
    [InlineData("data/tables/weights.csv")]
    [InlineData("data/layers/basins.shp")]
    [InlineData("data/recipe/monthly-totals.csx")]
    [InlineData("data/audit.json")]
    [InlineData("data/run.json")]
    [InlineData("bag-info.txt")]
    public void A_changed_byte_is_located(string file)
    {
        using var tool = new Tool();
        var study = Copy(tool);
        var path = Path.Combine(study, file);
        var bytes = File.ReadAllBytes(path);
        bytes[bytes.Length / 2] ^= 1;
        File.WriteAllBytes(path, bytes);

        var said = tool.Run("rerun", study);

        said.ExitCode.ShouldBe(6);
        said.Output.ShouldStartWith("CANNOT RERUN");
        said.Output.ShouldContain($"RR0804   {file}:");
    }

    [Fact]
    public void A_number_changed_and_sealed_again_is_caught_by_the_rerun_and_named()
    {
        using var tool = new Tool();
        var study = Copy(tool);
        var path = Path.Combine(study, "data", "tables", "rain-by-month.csv");
        var lines = File.ReadAllLines(path);
        var cells = lines[4].Split(',');
        var was = cells[2];
        cells[2] = "999.5";
        lines[4] = string.Join(',', cells);
        File.WriteAllText(path, string.Join('\n', lines) + "\n");
        SealAgain(study);

        var said = tool.Run("rerun", study, "--report", "report.html");

        said.ExitCode.ShouldBe(5);
        File.ReadAllText(tool.PathOf("report.html")).ShouldContain("holds 999.5");
        using var json = System.Text.Json.JsonDocument.Parse(tool.Run("rerun", study, "--json").Output);
        json.RootElement.GetProperty("verdict").GetString().ShouldBe("differs");
        json.RootElement.GetProperty("worst")[0].GetProperty("was").GetString().ShouldBe("999.5");
        said.Output.ShouldStartWith("DIFFERS");
        said.Output.ShouldContain($"tables/rain-by-month.csv, line 5 (2023-01), B-2: holds 999.5, reruns to {was}");
    }

    [Fact]
    public void A_page_that_was_made_to_say_something_else_is_caught()
    {
        using var tool = new Tool();
        var study = Copy(tool);
        var path = Path.Combine(study, "data", "summary.html");
        File.WriteAllText(
            path,
            File.ReadAllText(path).Replace("licensed professional", "good friend", StringComparison.Ordinal)
        );
        SealAgain(study);

        var said = tool.Run("rerun", study);

        said.ExitCode.ShouldBe(5);
        said.Output.ShouldContain("summary.html differs");
    }

    [Theory]
    [InlineData("no-such.study", "RR0801")]
    [InlineData(".", "RR0801")]
    public void What_is_no_study_cannot_be_rerun(string name, string code)
    {
        using var tool = new Tool();

        var said = tool.Run("rerun", name);

        said.ExitCode.ShouldBe(6);
        said.Output.ShouldContain(code);
    }

    /// <summary>Source: the demo's own files, read by hand: day 2024-01-14 is line 472 of daily.csv, Q-08 its ninth column.</summary>
    [Fact]
    public void A_value_is_traced_to_gauges_weights_steps_and_lines()
    {
        var said = demo.Tool.Run("trace", demo.Folder, "B-2", "2024-01-14");
        said.ExitCode.ShouldBe(0, said.Errors);
        said.Output.ShouldStartWith("B-2 Lower Quell, from 2024-01-13T09:00 to 2024-01-14T09:00:");
        var line = File.ReadAllLines(Path.Combine(DemoStudy.Data, "daily.csv"))[471].Split(',');
        line[0].ShouldBe("2024-01-14");
        said.Output.ShouldContain($"Q-08   daily.csv, line 472, column 9: \"{line[8]}\"");
        said.Output.ShouldContain("monthly-totals.csx line 16");

        var csv = demo.Tool.Run("trace", demo.Folder, "B-2", "2024-01-14", "--csv").Output.Split('\n');
        var sum = csv.Skip(1).Where(row => row.Length > 0).Sum(row => Number(row.Split(',')[6]));
        var table = File.ReadAllLines(demo.PathOf("tables/areal-rainfall.csv"));
        var held = table.Single(row => row.Contains(",2024-01-14T09:00,", StringComparison.Ordinal)).Split(',')[
            Array.IndexOf(table[0].Split(','), "B-2")
        ];
        sum.ShouldBe(Number(held), 1e-6);
        demo.Tool.Run("trace", demo.Folder, "B-2", "2024-01-14", "--json").Output.ShouldContain("\"column\": 9");
    }

    [Fact]
    public void A_cell_of_any_table_is_traced()
    {
        var month = demo.Tool.Run("trace", demo.Folder, "rain-by-month", "2023-01", "B-2");
        month.ExitCode.ShouldBe(0, month.Errors);
        month.Output.ShouldStartWith("tables/rain-by-month.csv, line 5 (2023-01), B-2: ");
        month.Output.ShouldContain("Total areal rainfall of Lower Quell");
        month.Output.ShouldContain("Mean rain");

        var day = demo.Tool.Run("trace", demo.Folder, "B-2", "2024-01-14").Output;
        demo.Tool.Run("trace", demo.Folder, "tables/areal-rainfall.csv", "472", "B-2").Output.ShouldBe(day);
        demo.Tool.Run("trace", demo.Folder, "areal-rainfall", "2024-01-13T09:00", "B-2").Output.ShouldBe(day);
        demo.Tool.Run("trace", demo.Folder, "weights", "B-2", "weight").Errors.ShouldContain("RR0826");
        demo.Tool.Run("trace", demo.Folder, "rain-by-mont", "2", "B-2").Errors.ShouldContain("Did you mean");
        demo.Tool.Run("trace", demo.Folder, "rain-by-month", "2", "B-22").Errors.ShouldContain("RR0825");
    }

    [Theory]
    [InlineData("B-9", "2024-01-14", "RR0822")]
    [InlineData("B-2", "2034-01-14", "RR0823")]
    [InlineData("B-2", "yesterday", "RR0823")]
    public void What_cannot_be_traced_is_refused(string basin, string time, string code)
    {
        var said = demo.Tool.Run("trace", demo.Folder, basin, time);

        said.ExitCode.ShouldBe(1);
        said.Errors.ShouldContain(code);
    }

    private static double Number(string text) => double.Parse(text, System.Globalization.CultureInfo.InvariantCulture);

    private string Copy(Tool tool)
    {
        tool.Command("cp", "-r", demo.Folder, tool.PathOf("copy.study")).ExitCode.ShouldBe(0);
        return tool.PathOf("copy.study");
    }

    /// <summary>Seals with general-purpose tools what was changed, as one would who wants to deceive.</summary>
    private static void SealAgain(string study)
    {
        var payload = Directory.GetFiles(Path.Combine(study, "data"), "*", SearchOption.AllDirectories);
        var oxum = FormattableString.Invariant(
            $"Payload-Oxum: {payload.Sum(file => new FileInfo(file).Length)}.{payload.Length}"
        );
        var info = Path.Combine(study, "bag-info.txt");
        var lines = File.ReadAllLines(info)
            .Select(line => line.StartsWith("Payload-Oxum", StringComparison.Ordinal) ? oxum : line);
        File.WriteAllText(info, string.Join('\n', lines) + "\n");
        Manifest(study, "manifest-sha256.txt", payload);
        Manifest(
            study,
            "tagmanifest-sha256.txt",
            [.. new[] { "bag-info.txt", "bagit.txt", "manifest-sha256.txt" }.Select(name => Path.Combine(study, name))]
        );
    }

    private static void Manifest(string study, string name, string[] files) =>
        File.WriteAllText(
            Path.Combine(study, name),
            string.Concat(
                files
                    .Select(file => Path.GetRelativePath(study, file))
                    .Order(StringComparer.Ordinal)
                    .Select(file => $"{Digest(Path.Combine(study, file))}  {file}\n")
            )
        );

    private static string Digest(string path) => Convert.ToHexStringLower(SHA256.HashData(File.ReadAllBytes(path)));

    private static string[] Digests(string folder) =>
        [
            .. Directory
                .GetFiles(folder, "*", SearchOption.AllDirectories)
                .Order(StringComparer.Ordinal)
                .Select(file => $"{file} {Digest(file)}"),
        ];
}
