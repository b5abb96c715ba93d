using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>Source: PROJ 9.1.1 through pyproj 3.4.1 from the base system to the code, unless said otherwise.</summary>
public sealed class GridTransformTests
{
    [Theory]
    [InlineData("EPSG:3338", "EPSG:4269", 179.5, 52, -1780626.583699, 581036.996891)]
    [InlineData("EPSG:3338", "EPSG:4269", -179.5, 52, -1716838.398989, 554704.550487)]
    [InlineData("EPSG:3338", "EPSG:4269", 180.5, 52, -1716838.398989, 554704.550487)]
    [InlineData("EPSG:3460", "EPSG:4720", 179.9, -17, 2122447.160156, 3999640.688517)]
    [InlineData("EPSG:3460", "EPSG:4720", -179.9, -17, 2143745.364383, 3999504.814440)]
    public void Longitudes_go_on_across_180(string grid, string degrees, double lon, double lat, double x, double y) =>
        Apply(degrees, grid, new Location(lon, lat)).DistanceTo(new Location(x, y)).ShouldBeLessThan(0.001);

    /// <summary>Here the library alone is 7 km off: on the meridian of the centre of the Swiss grids.</summary>
    [Theory]
    [InlineData(7.439583333, 46.5, 2599999.999974, 1149713.213477)]
    [InlineData(7.4395, 46.5, 2599993.603694, 1149713.213481)]
    [InlineData(7.43958, 47.1, 2599999.746983, 1216406.454725)]
    public void The_meridian_of_Bern_is_no_seam(double lon, double lat, double x, double y)
    {
        var place = new Location(x, y);

        Apply("EPSG:4150", "EPSG:2056", new Location(lon, lat)).DistanceTo(place).ShouldBeLessThan(0.001);
        var back = Apply("EPSG:2056", "EPSG:4150", place);
        (back.X, back.Y).ShouldBe((lon, lat), new PairWithin(1e-8));
    }

    [Fact]
    public void Feet_are_held_as_metres()
    {
        var place = new Location(-79, 35.5);
        var metres = Apply("EPSG:4269", "EPSG:32119", place);
        var feet = Apply("EPSG:4269", "EPSG:2264", place);

        feet.DistanceTo(metres).ShouldBeLessThan(0.001);
        Apply("EPSG:2264", "EPSG:32119", feet).DistanceTo(metres).ShouldBeLessThan(0.001);
    }

    [Fact]
    public void Projected_results_lie_on_the_lattice()
    {
        var place = Apply("EPSG:4326", "EPSG:32633", new Location(13.123456789, 51.987654321));

        (place.X * 65536).ShouldBe(Math.Round(place.X * 65536));
        (place.Y * 65536).ShouldBe(Math.Round(place.Y * 65536));
        place.X.ShouldNotBe(Math.Round(place.X));
    }

    [Fact]
    public void Within_one_system_places_only_go_to_the_lattice()
    {
        var place = new Location(412330.123456789, 5640112.987654321);
        var result = Apply("EPSG:32633", "EPSG:32633", place);

        result.ShouldNotBe(place);
        result.DistanceTo(place).ShouldBeLessThan(1.1e-5);
        Apply("EPSG:4326", "EPSG:4326", new Location(13.123456789012, 51)).X.ShouldBe(13.123456789012);
    }

    [Fact]
    public void From_grid_to_grid_the_way_leads_through_degrees()
    {
        var degrees = new Location(11.9, 51.3);
        var over = Apply("EPSG:25832", "EPSG:25833", Apply("EPSG:4258", "EPSG:25832", degrees));

        over.DistanceTo(Apply("EPSG:4258", "EPSG:25833", degrees)).ShouldBeLessThan(5e-5);
    }

    /// <summary>The longitude of Bern from Greenwich is 7 degrees 26 minutes 22.5 seconds: EPSG:8907.</summary>
    [Fact]
    public void Longitudes_count_from_the_meridian_of_their_system() =>
        Apply("EPSG:4801", "EPSG:4149", new Location(1, 47)).X.ShouldBe(8 + (26 / 60.0) + (22.5 / 3600), 1e-9);

    [Theory]
    [InlineData(double.NaN, 50)]
    [InlineData(13, double.PositiveInfinity)]
    [InlineData(13, 90.0001)]
    [InlineData(412330, 50)]
    public void What_is_no_place_is_refused(double lon, double lat) =>
        Refusals.Of(() => Apply("EPSG:4326", "EPSG:32633", new Location(lon, lat))).Code.ShouldBe("RR0330");

    [Fact]
    public void A_place_of_a_grid_that_no_degrees_lead_to_is_refused() =>
        Refusals.Of(() => Apply("EPSG:3035", "EPSG:4258", new Location(4e7, 4e7))).Code.ShouldBe("RR0333");

    [Fact]
    public void A_transform_is_safe_for_several_threads()
    {
        var transform = GridTransform.Between(ReferenceSystems.Find("EPSG:4326"), ReferenceSystems.Find("EPSG:32633"));
        var places = Enumerable.Range(0, 2000).Select(i => new Location(12 + (i * 0.003), 50)).ToArray();
        var once = new Location[places.Length];
        transform.Apply(places, once);

        Parallel.For(
            0,
            8,
            _ =>
            {
                var again = new Location[places.Length];
                transform.Apply(places, again);
                again.ShouldBe(once);
            }
        );
    }

    private static Location Apply(string from, string to, Location place)
    {
        var results = new Location[1];
        GridTransform.Between(ReferenceSystems.Find(from), ReferenceSystems.Find(to)).Apply([place], results);
        return results[0];
    }

    private sealed class PairWithin(double tolerance) : IEqualityComparer<(double, double)>
    {
        public bool Equals((double, double) x, (double, double) y) =>
            Math.Abs(x.Item1 - y.Item1) <= tolerance && Math.Abs(x.Item2 - y.Item2) <= tolerance;

        public int GetHashCode((double, double) obj) => 0;
    }
}
