using RecipeRunner.EndToEnd.Tests.Running;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>A study of many small files, made once, that stands where another run is to put its own.</summary>
public sealed class OldStudy : IDisposable
{
    private readonly string recipe;

    public OldStudy()
    {
        recipe = Tool.Write(
            "many.csx",
            """
            Title(Setting("mark", "new"));
            var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326")).To(Crs("EPSG:32633"));
            ReadRecords("daily.csv", unit: RainUnit.Millimetres, step: TimeStep.Days(endingAt: "09:00"));
            for (var i = 0; i < 60; i++) { EmitLayer(gauges, $"gauges-{i:00}"); }
            """
        );
        Tool.Run(Run("old", Folder, replace: false)).ExitCode.ShouldBe(0);
    }

    public Tool Tool { get; } = new();

    public string Folder => Tool.PathOf("many.study");

    /// <summary>The words of a run of the same recipe.</summary>
    public string[] Run(string mark, string into, bool replace = true) =>
        [
            "run",
            recipe,
            "--data",
            DemoStudy.Data,
            "--set",
            $"mark={mark}",
            "--into",
            into,
            "--quiet",
            .. replace ? (string[])["--replace"] : [],
        ];

    public void Dispose() => Tool.Dispose();
}
