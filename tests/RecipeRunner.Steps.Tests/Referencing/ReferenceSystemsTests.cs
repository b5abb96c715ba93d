using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>Source: EPSG v10.076.</summary>
public sealed class ReferenceSystemsTests
{
    [Fact]
    public void A_projected_system_comes_with_its_facts()
    {
        var system = ReferenceSystems.Find("EPSG:2264");

        system.Code.ShouldBe("EPSG:2264");
        system.Name.ShouldBe("NAD83 / North Carolina (ftUS)");
        system.Kind.ShouldBe(ReferenceSystemKind.Projected);
        system.Datum.ShouldBe("North American Datum 1983");
        system.UnitName.ShouldBe("US survey foot");
        system.MetresPerUnit.ShouldBe(1200.0 / 3937, 1e-15);
        system.Wkt.ShouldStartWith("PROJCS[\"NAD83 / North Carolina (ftUS)\"");
    }

    [Fact]
    public void A_geographic_system_comes_with_its_facts()
    {
        var system = ReferenceSystems.Find("EPSG:4326");

        system.Kind.ShouldBe(ReferenceSystemKind.Geographic);
        system.UnitName.ShouldBe("degree");
        system.MetresPerUnit.ShouldBe(1);
    }

    [Theory]
    [InlineData("epsg:32633")]
    [InlineData("  EPSG: 32633 ")]
    public void Case_and_blanks_do_not_matter(string code) => ReferenceSystems.Find(code).Code.ShouldBe("EPSG:32633");

    [Theory]
    [InlineData("32633", "Crs(\"EPSG:32633\")")]
    [InlineData("WGS 84", "EPSG:32633")]
    [InlineData("EPSG:", "EPSG:32633")]
    [InlineData("EPSG:32 633", "EPSG:32633")]
    [InlineData("EPSG:-1", "EPSG:32633")]
    [InlineData("EPSG:12345678", "EPSG:32633")]
    [InlineData("ESRI:102003", "EPSG:32633")]
    public void What_is_no_code_is_refused_with_an_example(string code, string example)
    {
        var refusal = Refusals.Of(() => ReferenceSystems.Find(code));

        refusal.Code.ShouldBe("RR0301");
        refusal.Mend.ShouldContain(example);
    }

    [Fact]
    public void An_unknown_code_is_refused_with_near_ones()
    {
        var refusal = Refusals.Of(() => ReferenceSystems.Find("EPSG:32663"));

        refusal.Code.ShouldBe("RR0303");
        var unknown = Refusals.Of(() => ReferenceSystems.Find("EPSG:32693"));
        unknown.Code.ShouldBe("RR0302");
        unknown.Mend.ShouldContain("EPSG:32633 (WGS 84 / UTM zone 33N)");
    }

    [Fact]
    public void Paris_grads_are_refused_as_coordinates() =>
        Refusals.Of(() => ReferenceSystems.Find("EPSG:4807")).What.ShouldContain("grad");

    [Fact]
    public void A_refused_grid_suggests_another_where_one_zone_will_do() =>
        Refusals.Of(() => ReferenceSystems.Find("EPSG:3993")).Mend.ShouldContain("EPSG:32655");

    [Fact]
    public void Degrees_are_refused_for_areas_with_a_grid_for_the_place()
    {
        var refusal = Refusals.Of(() =>
            WorkingGrid.RequireForAreas(ReferenceSystems.Find("EPSG:4326"), "basins.shp", new Bounds(13, 50, 14, 51))
        );

        (refusal.Code, refusal.Where.File).ShouldBe(("RR0350", "basins.shp"));
        refusal.Mend.ShouldContain("EPSG:32633");
        refusal.Mend.ShouldContain(".To(Crs(");
    }

    [Theory]
    [InlineData("EPSG:3857")]
    [InlineData("EPSG:3395")]
    [InlineData("EPSG:3832")]
    public void Mercator_is_refused_for_areas(string code) =>
        Refusals
            .Of(() => WorkingGrid.RequireForAreas(ReferenceSystems.Find(code), "basins.shp"))
            .Code.ShouldBe("RR0351");

    [Theory]
    [InlineData("EPSG:32633")]
    [InlineData("EPSG:3035")]
    [InlineData("EPSG:2264")]
    public void Working_grids_are_taken_for_areas(string code) =>
        Should.NotThrow(() => WorkingGrid.RequireForAreas(ReferenceSystems.Find(code), "basins.shp"));
}
