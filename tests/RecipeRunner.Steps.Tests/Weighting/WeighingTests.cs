using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Tests.Weighting;

public sealed class WeighingTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Degrees_and_web_mercator_are_refused_with_the_mend()
    {
        bench.Write("gauges.csv", "gauge,lon,lat\nA,13.1,50.1\nB,13.9,50.8\n");
        var gauges = bench.Verbs.ReadGauges(
            "gauges.csv",
            id: "gauge",
            x: "lon",
            y: "lat",
            crs: bench.Verbs.Crs("EPSG:4326")
        );

        var problem = Bench.Refused(() => gauges.ThiessenCells())[0];
        problem.Code.ShouldBe("RR0350");
        problem.Mend.ShouldContain("EPSG:32633");
        Bench.Refused(() => gauges.To(bench.Verbs.Crs("EPSG:3857")).ThiessenCells())[0].Code.ShouldBe("RR0351");
    }

    [Fact]
    public void Layers_in_two_systems_are_refused_naming_the_recipe_lines()
    {
        var cells = bench.Network(("A", 0, 0)).ThiessenCells();
        var basins = bench.Study.Take(
            new BasinLayer(
                [new Basin("b", "b", Bench.Box(0, 0, 1, 1))],
                ReferenceSystems.Find("EPSG:32633"),
                "basins.shp"
            )
        );

        var problem = Bench.Refused(() => basins.WeighBy(cells))[0];
        problem.Code.ShouldBe("RR0401");
        problem.What.ShouldContain("EPSG:32633 (trial.csx line 3)");
        problem.What.ShouldContain("EPSG:32632 (trial.csx line 1)");
    }

    [Fact]
    public void The_order_of_gauges_in_the_file_changes_no_digest()
    {
        (string, double, double)[] gauges = [("A", 0, 0), ("B", 900, 100), ("C", 300, 800), ("D", 1000, 1000)];
        var basins = bench.Basins(("box", Bench.Box(-100, -50, 1200, 1100)));

        var one = basins.WeighBy(bench.Network(gauges).ThiessenCells());
        var other = basins.WeighBy(bench.Network([.. gauges.Reverse()]).ThiessenCells());

        other.Digest.ShouldBe(one.Digest);
    }

    [Fact]
    public void A_gauge_left_out_is_gone_and_found_and_a_wrong_name_is_refused()
    {
        var network = bench.Network(("Q-1", 0, 0), ("Q-2", 0, 0), ("Q-3", 5, 5));

        network.Without("Q-2").ThiessenCells().Gauges.Gauges.Select(gauge => gauge.Id).ShouldBe(["Q-1", "Q-3"]);
        bench.Study.Findings.Single().Code.ShouldBe("RR0404");
        Bench.Refused(() => network.Without("Q-22"))[0].Mend.ShouldContain("Q-2");
    }

    [Fact]
    public void Unused_gauges_are_a_notice()
    {
        bench
            .Basins(("box", Bench.Box(0, 0, 10, 10)))
            .WeighBy(bench.Network(("near", 5, 5), ("far", 500, 500)).ThiessenCells());

        bench.Study.Findings.Single(finding => finding.Code == "RR0406").What.ShouldContain("far");
    }

    [Fact]
    public void Basins_without_a_gauge_of_their_own_are_a_notice()
    {
        var basins = bench.Basins(("gauged", Bench.Box(0, 0, 10, 10)), ("bare", Bench.Box(10, 0, 20, 10)));
        basins.WeighBy(bench.Network(("A", 5, 5)).ThiessenCells());

        bench
            .Study.Findings.Single()
            .ShouldSatisfyAllConditions(f => f.Code.ShouldBe("RR0407"), f => f.What.ShouldContain("within bare;"));
    }

    [Fact]
    public void Pieces_tile_their_basins()
    {
        var gauges = bench.Network(("A", 10, 10), ("B", 90, 20), ("C", 50, 90), ("D", 400, 400));
        var hole = new Region([
            new RegionPart(
                new Ring([new(0, 0), new(100, 0), new(100, 100), new(0, 100)]),
                [new Ring([new(40, 40), new(40, 60), new(60, 60), new(60, 40)])]
            ),
        ]);
        var basins = bench.Basins(("holed", hole), ("beyond", Bench.Box(100, 0, 800, 700)));
        var pieces = gauges.ThiessenCells().CutTo(basins).Pieces.ToLookup(piece => piece.BasinId);

        pieces["holed"].Sum(piece => piece.Shape.Area).ShouldBe(9600, 1e-6);
        pieces["beyond"].Sum(piece => piece.Shape.Area).ShouldBe(490_000, 1e-5);
    }

    [Fact]
    public void Triangles_are_counter_clockwise_in_a_fixed_order_and_a_line_has_none()
    {
        var triangles = bench.Network(("A", 0, 0), ("B", 100, 0), ("C", 100, 80), ("D", 0, 90)).Triangulate();

        // common practice, no source: of the two diagonals the one is taken whose opposite angles sum to less than 180°.
        triangles.Triangles.ShouldBe([new GaugeTriangle(0, 1, 2), new GaugeTriangle(0, 2, 3)]);
        bench.Network(("A", 0, 0), ("B", 10, 10), ("C", 20, 20)).Triangulate().Triangles.ShouldBeEmpty();
    }

    [Fact]
    public void A_refusal_is_an_exception_that_tells_all_its_reasons()
    {
        var network = bench.Network(("A", 0, 0), ("B", 0, 0), ("C", 1, 1), ("D", 1, 1));

        Should
            .Throw<RefusedException>(() => network.ThiessenCells())
            .Problems.Select(problem => problem.Where.Item)
            .ShouldBe(["gauges A and B", "gauges C and D"]);
    }
}
