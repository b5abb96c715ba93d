using System.Security.Cryptography;
using System.Text;
using RecipeRunner.EndToEnd.Tests.Running;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>The same inputs give the same bytes, whatever the machine's language, clock, time zone, processors or folder.</summary>
public sealed class DeterminismTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    private static readonly string[] OfTheRun =
    [
        "bag-info.txt",
        "data/ro-crate-metadata.json",
        "data/run.json",
        "manifest-sha256.txt",
        "tagmanifest-sha256.txt",
    ];

    /// <summary>
    /// The tool is built to know no culture but the invariant one; here that is taken away and the environment's cultures are real, so
    /// that only what the code itself states holds. Turkish has a dotless i, German a decimal comma, Arabic digits and a calendar of its own.
    /// </summary>
    [Theory]
    [InlineData("de_DE.UTF-8", "Pacific/Kiritimati", "1")]
    [InlineData("tr_TR.UTF-8", "America/St_Johns", "2")]
    [InlineData("ar_SA.UTF-8", "Asia/Kathmandu", "1")]
    public void Culture_time_zone_processors_and_folder_change_no_byte(string culture, string zone, string processors)
    {
        using var abroad = new Tool();
        abroad.Command("cp", "-r", DemoStudy.Data, abroad.PathOf("data")).ExitCode.ShouldBe(0);
        abroad
            .Command("cp", DemoStudy.Recipe("monthly-totals"), abroad.PathOf("monthly-totals.csx"))
            .ExitCode.ShouldBe(0);
        var said = abroad.RunWithCultures(
            [("LC_ALL", culture), ("LANG", culture), ("TZ", zone), ("DOTNET_PROCESSOR_COUNT", processors)],
            "run",
            "monthly-totals.csx",
            "--data",
            "data"
        );

        said.ExitCode.ShouldBe(0, said.Errors);
        Differing(abroad.PathOf("monthly-totals.study")).ShouldBeEmpty();
    }

    /// <summary>
    /// Digests of tables as they were when this was last agreed to. They are no truth from outside: they make a change of numbers
    /// show, which is then told in the release notes. Depths have 6 decimals and weights 15; a machine whose sines differ in the last
    /// bit could differ in the last digit of a weight, hardly ever in a depth.
    /// </summary>
    [Theory]
    [InlineData("demo")]
    [InlineData("nc1948")]
    public void Tables_have_the_digests_that_were_agreed_to(string study)
    {
        using var tool = new Tool();
        var folder = study == "demo" ? demo.Folder : RunNorthCarolina(tool);
        var tables = Path.Combine(folder, "data", "tables");
        var digests = new StringBuilder();
        foreach (var table in Directory.EnumerateFiles(tables).Order(StringComparer.Ordinal))
        {
            var digest = Convert.ToHexStringLower(SHA256.HashData(File.ReadAllBytes(table)));
            digests.Append(digest).Append("  ").Append(Path.GetFileName(table)).Append('\n');
        }

        digests
            .ToString()
            .ShouldBe(File.ReadAllText(Path.Combine(Tool.Repository, "tests", "agreed", $"{study}.sha256")));
    }

    private static string RunNorthCarolina(Tool tool)
    {
        var recipe = tool.Write(
            "nc1948.csx",
            """
            Source("*", "See tests/reference/README.md.");
            var grid = Crs("EPSG:32119");
            var counties = ReadBasins("nc.shp", id: "FIPSNO", name: "NAME").To(grid, datum: DatumChoice.TakeAsIs);
            var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4269")).To(grid);
            EmitTable(counties.WeighBy(gauges.ThiessenCells()), "weights");
            """
        );
        var said = tool.Run("run", recipe, "--data", Path.Combine(Tool.Repository, "tests", "reference", "nc1948"));
        said.ExitCode.ShouldBe(0, said.Errors);
        return tool.PathOf("nc1948.study");
    }

    private IEnumerable<string> Differing(string other)
    {
        var files = Directory
            .EnumerateFiles(demo.Folder, "*", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(demo.Folder, path))
            .ToArray();
        files.Length.ShouldBeGreaterThan(30);
        return files
            .Except(OfTheRun)
            .Where(file =>
                !File.ReadAllBytes(Path.Combine(demo.Folder, file))
                    .SequenceEqual(File.ReadAllBytes(Path.Combine(other, file)))
            );
    }
}
