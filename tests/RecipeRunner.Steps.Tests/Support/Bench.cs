using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Support;

/// <summary>A data folder of its own for one test, and the verbs of a recipe over it.</summary>
public sealed class Bench : IDisposable
{
    public Bench()
    {
        Folder = Directory.CreateTempSubdirectory("recipe-runner-steps-").FullName;
        Study = new TrialStudy(Folder);
        Verbs = new RecipeVerbs(Study);
    }

    public string Folder { get; }

    public TrialStudy Study { get; }

    public RecipeVerbs Verbs { get; }

    /// <summary>A grid in metres. Data whose source gives no reference system are taken as if on it; only their numbers count.</summary>
    public static ReferenceSystem Plane { get; } = ReferenceSystems.Find("EPSG:32632");

    public void Write(string name, string text) => File.WriteAllText(Path.Combine(Folder, name), text);

    public void Write(string name, byte[] bytes) => File.WriteAllBytes(Path.Combine(Folder, name), bytes);

    /// <summary>Copies a shapefile of the reference data, all its parts.</summary>
    public void CopyShapefile(string stem, string name)
    {
        foreach (
            var path in Directory.GetFiles(
                Path.GetDirectoryName(ReferenceFolder.PathOf(stem + ".shp"))!,
                Path.GetFileName(stem) + ".*"
            )
        )
        {
            File.Copy(path, Path.Combine(Folder, name + Path.GetExtension(path)));
        }
    }

    /// <summary>The problems for which something is refused.</summary>
    public static IReadOnlyList<Finding> Refused(Action work) => Should.Throw<RefusedException>(work).Problems;

    public GaugeNetwork Network(params (string Id, double X, double Y)[] gauges) =>
        Study.Take(
            new GaugeNetwork(
                gauges.Select(gauge => new Gauge(gauge.Id, new Location(gauge.X, gauge.Y))),
                Plane,
                "gauges of a test"
            )
        );

    public BasinLayer Basins(params (string Id, Region Shape)[] basins) =>
        Study.Take(
            new BasinLayer(
                [.. basins.Select(basin => new Basin(basin.Id, basin.Id, basin.Shape))],
                Plane,
                "basins of a test"
            )
        );

    public static Region Box(double west, double south, double east, double north) =>
        Region.OfShell([new(west, south), new(east, south), new(east, north), new(west, north)]);

    public void Dispose() => Directory.Delete(Folder, recursive: true);
}
