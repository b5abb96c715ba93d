using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>Source: tests/reference/crs (PROJ 9.1.1 through pyproj 3.4.1; worked examples of IOGP 373-7-2).</summary>
public sealed class ProjectedPointsTests
{
    private static readonly Dictionary<string, Dictionary<string, string>> Systems = ReferenceTable
        .Rows("crs/crs_list.csv")
        .ToDictionary(row => row["epsg"], StringComparer.Ordinal);

    private static readonly ILookup<string, Dictionary<string, string>> Points = ReferenceTable
        .Rows("crs/projected_points.csv")
        .ToLookup(row => row["epsg"], StringComparer.Ordinal);

    public static TheoryData<string> Codes => [.. Systems.Keys.Where(code => !IsPolar(code))];

    [Fact]
    public void All_but_the_polar_stereographic_codes_are_usable() => (Systems.Count, Codes.Count).ShouldBe((84, 82));

    [Theory]
    [InlineData("3031")]
    [InlineData("3413")]
    public void Polar_stereographic_codes_are_refused_by_method(string code)
    {
        var refusal = Refusals.Of(() => ReferenceSystems.Find("EPSG:" + code));

        refusal.Code.ShouldBe("RR0303");
        refusal.What.ShouldContain("Polar Stereographic (variant B)");
    }

    [Theory]
    [MemberData(nameof(Codes))]
    public void Degrees_go_to_the_grid_and_back(string code)
    {
        var grid = GridOf(code);
        var degrees = Points[code].Select(row => new Location(row.Number("lon"), row.Number("lat"))).ToArray();
        var metres = Points[code]
            .Select(row => new Location(row.Number("easting"), row.Number("northing")))
            .Select(place => new Location(place.X * grid.MetresPerUnit, place.Y * grid.MetresPerUnit))
            .ToArray();
        var tolerance = code == "3035" ? 0.005 : 0.001;

        var there = new Location[degrees.Length];
        GridTransform.Between(BaseOf(code), grid).Apply(degrees, there);
        var back = new Location[degrees.Length];
        GridTransform.Between(grid, BaseOf(code)).Apply(metres, back);

        degrees.Length.ShouldBe(12);
        for (var i = 0; i < degrees.Length; i++)
        {
            there[i].DistanceTo(metres[i]).ShouldBeLessThan(tolerance);
            Ground.Metres(KnownSystem.Of(grid), back[i], degrees[i]).ShouldBeLessThan(tolerance);
        }
    }

    /// <summary>For web Mercator the reference gives the scale on the sphere that it pretends.</summary>
    [Theory]
    [MemberData(nameof(Codes))]
    public void Scales_are_those_of_the_reference(string code)
    {
        var grid = KnownSystem.Of(GridOf(code));
        var isTrue = grid.Definition.Form!.Method != PlaneMethod.WebMercator;
        foreach (var row in Points[code].Where(row => isTrue && row["meridional_scale"].Length > 0))
        {
            var degrees = new Location(row.Number("lon"), row.Number("lat"));
            var scale = LocalScale.At(grid.Projection!, grid.Definition.Ellipsoid, degrees);
            var meridional = row.Number("meridional_scale");
            meridional.ShouldBeInRange(scale.Least - 1e-7, scale.Most + 1e-7);
            if (grid.Definition.Form!.IsConformal)
            {
                scale.Least.ShouldBe(meridional, 1e-7);
                scale.Most.ShouldBe(meridional, 1e-7);
                scale.AlongParallel.ShouldBe(meridional, 1e-7);
                scale.Area.ShouldBe(meridional * meridional, 1e-7);
            }

            if (grid.Definition.Form!.IsEqualArea)
            {
                scale.Area.ShouldBe(1, 1e-7);
            }
        }
    }

    /// <summary>
    /// The columns of the two grids with other axes are southing, westing (5513) and westing, southing (2053), as theirs.
    /// Published values are rounded, and Belgium's uses another variant of the method: hence the file's own differences.
    /// </summary>
    [Fact]
    public void Published_worked_examples_are_met()
    {
        var examples = ReferenceTable.Rows("crs/guidance_note_examples.csv").ToArray();
        foreach (var row in examples)
        {
            var system = KnownSystem.Of(ReferenceSystems.Find("EPSG:" + row["epsg"]));
            var unit = system.Definition.MetresPerUnit;
            var plane = system.Projection!.ToPlane(new Location(row.Number("lon"), row.Number("lat")));
            var own = new Location(plane.X / unit, plane.Y / unit);

            own.DistanceTo(new Location(row.Number("proj_1"), row.Number("proj_2")))
                .ShouldBeLessThan(0.001, row["example"]);
            own.DistanceTo(new Location(row.Number("published_1"), row.Number("published_2")))
                .ShouldBeLessThan(row.Number("difference") + 0.001, row["example"]);
        }

        examples.Length.ShouldBe(12);
    }

    /// <summary>EPSG:28402 is withdrawn.</summary>
    private static ReferenceSystem GridOf(string code) =>
        code == "28402"
            ? PrjReader.Match(File.ReadAllText(ReferenceFolder.PathOf("crs/wkt/28402.gdal.wkt")), "28402.gdal.wkt")
            : ReferenceSystems.Find("EPSG:" + code);

    /// <summary>Paris grads are no degrees; the same datum counted from Greenwich is EPSG:4275.</summary>
    private static ReferenceSystem BaseOf(string code) =>
        ReferenceSystems.Find("EPSG:" + (code == "27572" ? "4275" : Systems[code]["base_epsg"]));

    private static bool IsPolar(string code) =>
        Systems[code]["method"].StartsWith("Polar Stereographic", StringComparison.Ordinal);
}
