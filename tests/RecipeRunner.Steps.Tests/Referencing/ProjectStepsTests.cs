using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Referencing;

public sealed class ProjectStepsTests
{
    private readonly TrialStudy study = new("none");

    [Fact]
    public void Gauges_keep_their_facts_and_get_metres()
    {
        var gauges = Gauges("EPSG:4326", ("Q-1", 13.5, 51), ("Q-2", 14, 51.5)).To(ReferenceSystems.Find("EPSG:32633"));

        gauges.ReferenceSystem.Code.ShouldBe("EPSG:32633");
        gauges.Source.ShouldBe("gauges.csv");
        gauges.Gauges.Select(gauge => (gauge.Id, gauge.ElevationMetres)).ShouldBe([("Q-1", 120.0), ("Q-2", 120.0)]);
        gauges.Gauges[0].Place.X.ShouldBeInRange(390_000, 400_000);
        study.Findings.ShouldBeEmpty();
        study.Statements.ShouldBe([
            ("datum", "none needed, both on World Geodetic System 1984 ensemble"),
            ("axes", "x east, y north, metres"),
        ]);
    }

    [Fact]
    public void A_datum_operation_is_stated()
    {
        Gauges("EPSG:4326", ("Q-1", 13.5, 51)).To(ReferenceSystems.Find("EPSG:25833"));

        study
            .Statements[0]
            .ShouldBe(("datum", "ETRS89 to WGS 84 (1) (EPSG:1149): null transformation, stated accuracy 1 m"));
    }

    [Fact]
    public void Gauges_far_outside_are_refused_each_by_name()
    {
        var gauges = Gauges("EPSG:4326", ("far-1", 51, 13.5), ("near", 13.5, 51), ("far-2", -70, 51));
        var refused = Should.Throw<RefusedException>(() => gauges.To(ReferenceSystems.Find("EPSG:32633")));

        refused.Problems.Select(problem => problem.Code).ShouldBe(["RR0332", "RR0332"]);
        refused.Problems.Select(problem => problem.Where.Item).ShouldBe(["gauge far-1", "gauge far-2"]);
        refused.Problems[0].Where.File.ShouldBe("gauges.csv");
    }

    [Fact]
    public void Gauges_a_little_outside_are_one_caution()
    {
        Gauges("EPSG:4326", ("a", 11, 51), ("b", 13, 51), ("c", 10.25, 51)).To(ReferenceSystems.Find("EPSG:32633"));

        var finding = study.Findings.ShouldHaveSingleItem();
        (finding.Severity, finding.Code).ShouldBe((Severity.Caution, "RR0331"));
        finding.What.ShouldStartWith("2 of 3 lie outside");
        finding.What.ShouldContain("gauge c, 1.75 degrees outside");
    }

    [Fact]
    public void A_gauge_at_no_place_is_refused_by_name()
    {
        var refusal = Refusals.Of(() =>
            Gauges("EPSG:4326", ("lost", double.NaN, 51)).To(ReferenceSystems.Find("EPSG:32633"))
        );

        (refusal.Code, refusal.Where).ShouldBe(("RR0330", new Place("gauges.csv", Item: "gauge lost")));
    }

    [Fact]
    public void The_scale_over_the_basins_is_stated()
    {
        Basins("EPSG:4326", Box(14, 50, 16, 51)).To(ReferenceSystems.Find("EPSG:32633"));

        study.Statements.ShouldContain(("scale", "lengths true within 0.04 % over the basins"));
        study.Findings.ShouldNotContain(finding => finding.Code == "RR0341");
    }

    /// <summary>Mercator multiplies areas by about 1 / cos² of the latitude: 2.5 at 51 degrees.</summary>
    [Fact]
    public void A_scale_beyond_a_percent_is_a_caution()
    {
        Basins("EPSG:4326", Box(14, 50.9, 14.1, 51)).To(ReferenceSystems.Find("EPSG:3857"));

        var finding = study.Findings.Single(finding => finding.Code == "RR0341");
        finding.What.ShouldContain("off by up to 160 %");
    }

    /// <summary>
    /// Source: PROJ 9.1.1 through pyproj 3.4.1: from (-104, 45) to (-97, 45) on NAD83 the parallel strays 5074.5156 m from the
    /// chord in EPSG:5070.
    /// </summary>
    [Fact]
    public void A_long_border_along_a_parallel_is_a_caution_and_densify_mends_it()
    {
        Basins("EPSG:4269", Box(-104, 45, -97, 49)).To(ReferenceSystems.Find("EPSG:5070"));

        var finding = study.Findings.Single(finding => finding.Code == "RR0340");
        finding.What.ShouldContain("the furthest by 5074.5 m on basin B-1");
        finding.Mend.ShouldContain("densify");

        study.Findings.Clear();
        var fine = Basins("EPSG:4269", Box(-104, 45, -97, 49)).To(ReferenceSystems.Find("EPSG:5070"), densify: 5000);

        study.Findings.ShouldBeEmpty();
        var shell = fine.Basins[0].Shape.Parts[0].Shell.Vertices;
        shell.Length.ShouldBeGreaterThan(300);
        Enumerable
            .Range(0, shell.Length)
            .Max(i => shell[i].DistanceTo(shell[(i + 1) % shell.Length]))
            .ShouldBeLessThan(5001);
    }

    [Fact]
    public void Densified_neighbours_share_every_vertex_of_their_border()
    {
        var layer = Basins("EPSG:4269", Box(-104, 45, -100, 49), Box(-100, 45, -97, 49))
            .To(ReferenceSystems.Find("EPSG:5070"), densify: 5000);
        var west = layer.Basins[0].Shape.Parts[0].Shell.Vertices;
        var east = layer.Basins[1].Shape.Parts[0].Shell.Vertices;

        west.Intersect(east).Count().ShouldBeInRange(85, 95);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    [InlineData(1e-9)]
    public void A_densify_of_no_use_is_refused(double densify) =>
        Refusals
            .Of(() => Basins("EPSG:4326", Box(14, 50, 15, 51)).To(ReferenceSystems.Find("EPSG:32633"), densify))
            .Code.ShouldBe("RR0352");

    [Fact]
    public void Metres_of_densify_are_refused_for_degrees() =>
        Refusals
            .Of(() => Basins("EPSG:32633", Box(4e5, 5e6, 5e5, 5.1e6)).To(ReferenceSystems.Find("EPSG:4326"), 1000))
            .Code.ShouldBe("RR0352");

    /// <summary>Krovak's own axes (EPSG:5513) mirror the plane, which would turn shells clockwise.</summary>
    [Fact]
    public void Shells_run_counter_clockwise_and_holes_clockwise_even_in_a_mirrored_plane()
    {
        var hole = new Ring([new(15.2, 49.8), new(15.2, 49.9), new(15.4, 49.9), new(15.4, 49.8)]);
        var shape = new Region([new RegionPart(Box(15, 49.5, 15.6, 50).Parts[0].Shell, [hole])]);
        foreach (var code in new[] { "EPSG:5513", "EPSG:5514" })
        {
            var part = Basins("EPSG:4156", shape).To(ReferenceSystems.Find(code)).Basins[0].Shape.Parts[0];

            part.Shell.SignedArea.ShouldBeGreaterThan(0, code);
            part.Holes.Single().SignedArea.ShouldBeLessThan(0, code);
        }

        study.Statements.ShouldContain(("axes", "x south, y west, metres"));
    }

    [Fact]
    public void Vertices_that_fall_together_become_one()
    {
        var shell = new Location[]
        {
            new(14, 50),
            new(15, 50),
            new(15, 51),
            new(15 + 1e-12, 51),
            new(14, 51),
            new(14, 50 + 1e-12),
        };
        var layer = Basins("EPSG:4326", Region.OfShell(shell)).To(ReferenceSystems.Find("EPSG:32633"));

        layer.Basins[0].Shape.VertexCount.ShouldBe(4);
    }

    [Fact]
    public void A_basin_that_collapses_is_refused_by_name()
    {
        var speck = Region.OfShell([new(14, 50), new(14 + 1e-11, 50), new(14, 50 + 1e-11)]);
        var refusal = Refusals.Of(() => Basins("EPSG:4326", speck).To(ReferenceSystems.Find("EPSG:32633")));

        (refusal.Code, refusal.Where).ShouldBe(("RR0342", new Place("basins.shp", Item: "basin B-1")));
    }

    [Fact]
    public void A_hole_that_collapses_is_left_out_and_found()
    {
        var speck = new Ring([new(14.5, 50.5), new(14.5, 50.5 + 1e-11), new(14.5 + 1e-11, 50.5)]);
        var shape = new Region([new RegionPart(Box(14, 50, 15, 51).Parts[0].Shell, [speck])]);
        var layer = Basins("EPSG:4326", shape).To(ReferenceSystems.Find("EPSG:32633"));

        layer.Basins[0].Shape.Parts[0].Holes.ShouldBeEmpty();
        study.Findings.Single(finding => finding.Code == "RR0342").Severity.ShouldBe(Severity.Caution);
    }

    /// <summary>A notch ends 1 km above a border along a parallel: the chord of that border passes 5 km above the parallel's image.</summary>
    [Fact]
    public void An_outline_that_crosses_itself_in_the_grid_is_refused_and_densify_mends_it()
    {
        var notched = Region.OfShell([new(-104, 45), new(-97, 45), new(-97, 49), new(-100.5, 45.01), new(-104, 49)]);
        var grid = ReferenceSystems.Find("EPSG:5070");

        Refusals.Of(() => Basins("EPSG:4269", notched).To(grid)).Code.ShouldBe("RR0343");
        Should.NotThrow(() => Basins("EPSG:4269", notched).To(grid, densify: 1000));
    }

    [Fact]
    public void A_basin_across_180_stays_in_one_piece_there_and_back()
    {
        var grid = ReferenceSystems.Find("EPSG:3460");
        var degrees = ReferenceSystems.Find("EPSG:4720");
        var basin = Region.OfShell([new(179.5, -17.5), new(-179.5, -17.5), new(-179.5, -17), new(179.5, -17)]);
        var projected = Basins("EPSG:4720", basin).To(grid);
        var back = projected.To(degrees).Basins[0].Shape;

        projected.Basins[0].Shape.Area.ShouldBeInRange(5.5e9, 6.5e9);
        back.Bounds.Width.ShouldBe(1, 1e-6);
        back.Area.ShouldBe(0.5, 1e-6);
        study.Findings.ShouldAllBe(finding => finding.Code == "RR0340");
    }

    [Fact]
    public void Nothing_becomes_nothing()
    {
        var grid = ReferenceSystems.Find("EPSG:32633");

        Gauges("EPSG:4326").To(grid).Gauges.ShouldBeEmpty();
        Basins("EPSG:4326").To(grid).Basins.ShouldBeEmpty();
        study.Findings.ShouldBeEmpty();
    }

    [Fact]
    public void Columns_come_along()
    {
        var layer = Basins("EPSG:4326", Box(14, 50, 15, 51));
        var with = study.Take(layer.WithColumns([Column.OfNumbers("pop", "", 0, "People", [7.0])]));

        with.To(ReferenceSystems.Find("EPSG:32633")).Columns.ShouldHaveSingleItem().Name.ShouldBe("pop");
    }

    private GaugeNetwork Gauges(string code, params (string Id, double X, double Y)[] gauges) =>
        study.Take(
            new GaugeNetwork(
                gauges.Select(gauge => new Gauge(gauge.Id, new Location(gauge.X, gauge.Y), 120)),
                ReferenceSystems.Find(code),
                "gauges.csv"
            )
        );

    private BasinLayer Basins(string code, params Region[] shapes) =>
        study.Take(
            new BasinLayer(
                [.. shapes.Select((shape, i) => new Basin(FormattableString.Invariant($"B-{i + 1}"), "", shape))],
                ReferenceSystems.Find(code),
                "basins.shp"
            )
        );

    private static Region Box(double west, double south, double east, double north) =>
        Region.OfShell([new(west, south), new(east, south), new(east, north), new(west, north)]);
}
