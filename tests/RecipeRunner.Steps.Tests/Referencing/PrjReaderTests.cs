using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>Source: tests/reference/crs/wkt (PROJ 9.1.1, both dialects of WKT 1) and tests/reference/nc1948/nc.prj.</summary>
public sealed class PrjReaderTests
{
    private const string Utm33 =
        "PROJCS[\"WGS_1984_UTM_Zone_33N\",GEOGCS[\"GCS_WGS_1984\",DATUM[\"D_WGS_1984\",SPHEROID[\"WGS_1984\",6378137.0,"
        + "298.257223563]],PRIMEM[\"Greenwich\",0.0],UNIT[\"Degree\",0.0174532925199433]],PROJECTION[\"Transverse_Mercator\"],"
        + "PARAMETER[\"False_Easting\",500000.0],PARAMETER[\"False_Northing\",0.0],PARAMETER[\"Central_Meridian\",15.0],"
        + "PARAMETER[\"Scale_Factor\",0.9996],PARAMETER[\"Latitude_Of_Origin\",0.0],UNIT[\"Meter\",1.0]]";

    private const string OwnGrid =
        "PROJCS[\"District grid\",GEOGCS[\"ETRS89\",DATUM[\"D_ETRS_1989\",SPHEROID[\"GRS_1980\",6378137,298.257222101]],"
        + "PRIMEM[\"Greenwich\",0],UNIT[\"Degree\",0.0174532925199433]],PROJECTION[\"Transverse_Mercator\"],"
        + "PARAMETER[\"False_Easting\",100000],PARAMETER[\"False_Northing\",200000],PARAMETER[\"Central_Meridian\",11.5],"
        + "PARAMETER[\"Scale_Factor\",0.99995],PARAMETER[\"Latitude_Of_Origin\",50],UNIT[\"Meter\",1]]";

    private const string OwnCone =
        "PROJCS[\"Plains\",GEOGCS[\"NAD83\",DATUM[\"D_North_American_1983\",SPHEROID[\"GRS_1980\",6378137,298.257222101]],"
        + "PRIMEM[\"Greenwich\",0],UNIT[\"Degree\",0.0174532925199433]],PROJECTION[\"Lambert_Conformal_Conic\"],"
        + "PARAMETER[\"False_Easting\",500000],PARAMETER[\"False_Northing\",0],PARAMETER[\"Central_Meridian\",-100],"
        + "PARAMETER[\"Standard_Parallel_1\",35],PARAMETER[\"Standard_Parallel_2\",45],PARAMETER[\"Scale_Factor\",0.9998],"
        + "PARAMETER[\"Latitude_Of_Origin\",40],UNIT[\"Meter\",1]]";

    public static TheoryData<string> Files =>
        [
            .. Directory
                .GetFiles(ReferenceFolder.PathOf("crs/wkt"))
                .Select(file => Path.GetFileName(file)!)
                .Order(StringComparer.Ordinal),
        ];

    /// <summary>EPSG:28402 is withdrawn: its grid is one that no current code has.</summary>
    [Theory]
    [MemberData(nameof(Files))]
    public void Both_dialects_lead_to_the_code_or_are_refused_by_method(string file)
    {
        var code = file.Split('.')[0];
        if (code is "3031" or "3413")
        {
            var refusal = Refusals.Of(() => PrjReader.Match(Text(file), file));
            refusal.Code.ShouldBe("RR0311");
            refusal.What.ShouldContain("tereographic");
            return;
        }

        var system = PrjReader.Match(Text(file), file);

        system.Code.ShouldBe(code == "28402" ? "" : "EPSG:" + code);
    }

    [Fact]
    public void There_are_both_dialects_of_84_codes() => Files.Count.ShouldBe(168);

    [Fact]
    public void A_geographic_file_is_matched_too()
    {
        var system = PrjReader.Match(File.ReadAllText(ReferenceFolder.PathOf("nc1948/nc.prj")), "nc.prj");

        system.Code.ShouldBe("EPSG:4267");
        system.Kind.ShouldBe(ReferenceSystemKind.Geographic);
        system.Datum.ShouldBe("North American Datum 1927");
    }

    [Fact]
    public void The_name_does_not_matter() =>
        PrjReader
            .Match(Utm33.Replace("WGS_1984_UTM_Zone_33N", "Gauß 7", StringComparison.Ordinal), "a.prj")
            .Code.ShouldBe("EPSG:32633");

    /// <summary>EPSG:31467 (official axes north, east) and EPSG:5677 (east, north) define one grid.</summary>
    [Theory]
    [InlineData("\"DHDN_3_Degree_Gauss_Zone_3\"", "EPSG:31467")]
    [InlineData("\"A grid\"", "EPSG:5677")]
    public void Where_several_codes_define_one_grid_the_name_decides_then_the_axes(string name, string code)
    {
        var text = Text("31467.esri.wkt").Replace("\"DHDN_3_Degree_Gauss_Zone_3\"", name, StringComparison.Ordinal);

        PrjReader.Match(text, "a.prj").Code.ShouldBe(code);
    }

    [Theory]
    [InlineData("32633.gdal.wkt")]
    [InlineData("27572.esri.wkt")]
    [InlineData("3857.gdal.wkt")]
    [InlineData("5514.esri.wkt")]
    [InlineData("2264.gdal.wkt")]
    public void Text_cut_anywhere_is_refused_at_once(string file)
    {
        var text = Text(file).Trim();
        for (var length = 0; length < text.Length; length++)
        {
            Refusals.Of(() => PrjReader.Match(text[..length], "cut.prj")).Code.ShouldBe("RR0310");
        }
    }

    public static TheoryData<string, string> Manners =>
        new()
        {
            { "byte-order mark", "\uFEFF" + Utm33 },
            { "lower case", Utm33.ToLowerInvariant().Replace("d_wgs_1984", "D_WGS_1984", StringComparison.Ordinal) },
            { "round brackets", Utm33.Replace('[', '(').Replace(']', ')') },
            { "white space", "\r\n" + Utm33.Replace(",", " ,\r\n\t", StringComparison.Ordinal) + "\n\0" },
            { "exponents", Utm33.Replace("500000.0", "5e5", StringComparison.Ordinal) },
            { "a vertical system after it", Utm33 + ",VERTCS[\"EGM96\",VDATUM[\"EGM96\"],UNIT[\"Meter\",1.0]]" },
            { "a compound system", $"COMPD_CS[\"both\",{Utm33},VERT_CS[\"height\",UNIT[\"Meter\",1]]]" },
            {
                "a hint at a shift",
                Utm33.Replace("298.257223563]]", "298.257223563],TOWGS84[0,0,0,0,0,0,0]]", StringComparison.Ordinal)
            },
        };

    [Theory]
    [MemberData(nameof(Manners))]
    public void Manners_of_writing_do_not_matter(string manner, string text) =>
        PrjReader.Match(text, "a.prj").Code.ShouldBe("EPSG:32633", manner);

    public static TheoryData<string, string, string> Flaws =>
        new()
        {
            { "empty", "", "RR0310" },
            { "not text of this kind", "\u0001\u0002\u0003", "RR0310" },
            { "too long", "PROJCS[\"" + new string('x', 30_000) + "\"]", "RR0310" },
            { "too deep", string.Concat(Enumerable.Repeat("A[", 9000)), "RR0310" },
            { "text after it", Utm33 + Utm33, "RR0310" },
            { "mixed brackets", Utm33[..^1] + ")", "RR0310" },
            { "a word for a number", Utm33.Replace("0.9996", "0.9996x", StringComparison.Ordinal), "RR0310" },
            { "no finite number", Utm33.Replace("0.9996", "1e999", StringComparison.Ordinal), "RR0310" },
            {
                "a misspelt parameter",
                Utm33.Replace("Scale_Factor", "Scale_Faktor", StringComparison.Ordinal),
                "RR0311"
            },
            {
                "a parameter twice",
                Utm33.Replace(
                    "PARAMETER[\"Central",
                    "PARAMETER[\"Scale_Factor\",1],PARAMETER[\"Central",
                    StringComparison.Ordinal
                ),
                "RR0311"
            },
            {
                "a parameter too many",
                Utm33.Replace(
                    "PARAMETER[\"Central",
                    "PARAMETER[\"Azimuth\",1],PARAMETER[\"Central",
                    StringComparison.Ordinal
                ),
                "RR0311"
            },
            {
                "another method",
                Utm33.Replace("Transverse_Mercator", "Transverse_Mercator_Complex", StringComparison.Ordinal),
                "RR0311"
            },
            { "WKT 2", Utm33.Replace("PROJCS", "PROJCRS", StringComparison.Ordinal), "RR0311" },
            { "a word unknown", Utm33.Replace("PRIMEM", "MERIDIAN", StringComparison.Ordinal), "RR0311" },
            { "the wrong figure", Utm33.Replace("6378137.0", "6378206.4", StringComparison.Ordinal), "RR0311" },
            { "no unit", Utm33.Replace(",UNIT[\"Meter\",1.0]", "", StringComparison.Ordinal), "RR0311" },
            {
                "a unit of nothing",
                Utm33.Replace("\"Meter\",1.0", "\"Meter\",0.0", StringComparison.Ordinal),
                "RR0311"
            },
            { "a local plane", "LOCAL_CS[\"site\",UNIT[\"Meter\",1]]", "RR0311" },
            {
                "a sphere under a method for the ellipsoid",
                Text("3035.esri.wkt").Replace("298.257222101", "0", StringComparison.Ordinal),
                "RR0311"
            },
            {
                "another extension",
                Text("3857.gdal.wkt").Replace("+proj=merc", "+proj=moll", StringComparison.Ordinal),
                "RR0311"
            },
            {
                "a Krovak grid of one's own",
                Text("5514.esri.wkt")
                    .Replace("\"Scale_Factor\",0.9999", "\"Scale_Factor\",0.99", StringComparison.Ordinal),
                "RR0312"
            },
            {
                "a scale in parts per million, as the registry once had one by mistake (EPSG:6996)",
                OwnGrid.Replace("0.99995", "1.000007E-06", StringComparison.Ordinal),
                "RR0312"
            },
            {
                "a web map of one's own",
                Text("3857.esri.wkt")
                    .Replace("\"Central_Meridian\",0.0", "\"Central_Meridian\",10.0", StringComparison.Ordinal),
                "RR0312"
            },
        };

    [Theory]
    [MemberData(nameof(Flaws))]
    public void Flawed_text_is_refused(string flaw, string text, string code)
    {
        var refusal = Refusals.Of(() => PrjReader.Match(text, "flawed.prj"));

        refusal.Code.ShouldBe(code, flaw);
        refusal.Where.File.ShouldBe("flawed.prj");
        refusal.Mend.ShouldNotBeEmpty();
    }

    /// <summary>Source: PROJ 9.1.1 through pyproj 3.4.1: +proj=tmerc +lat_0=50 +lon_0=11.5 +k=0.99995 +x_0=100000 +y_0=200000 +ellps=GRS80.</summary>
    [Theory]
    [InlineData(12.3, 51.2, 155913.182015, 333786.266198)]
    [InlineData(9.9, 49.1, -16832.319000, 101139.829554)]
    public void A_grid_that_no_registry_has_is_used_once_it_has_proved_itself(
        double lon,
        double lat,
        double x,
        double y
    )
    {
        var grid = PrjReader.Match(OwnGrid, "own.prj");
        var results = new Location[1];
        GridTransform.Between(ReferenceSystems.Find("EPSG:4258"), grid).Apply([new Location(lon, lat)], results);

        (grid.Code, grid.Name, grid.Label).ShouldBe(("", "District grid", "\"District grid\""));
        results[0].DistanceTo(new Location(x, y)).ShouldBeLessThan(0.001);
    }

    /// <summary>
    /// The library ignores a cone's scale. Source: PROJ 9.1.1 through pyproj 3.4.1: +proj=lcc +lat_0=40 +lon_0=-100 +lat_1=35
    /// +lat_2=45 +k_0=0.9998 +x_0=500000 +ellps=GRS80.
    /// </summary>
    [Theory]
    [InlineData(-95.5, 42.25, 869997.220958, 258292.024776)]
    [InlineData(-111, 33, -528799.286959, -711963.178491)]
    public void A_cone_with_two_parallels_and_a_scale_is_scaled(double lon, double lat, double x, double y)
    {
        var results = new Location[1];
        GridTransform
            .Between(ReferenceSystems.Find("EPSG:4269"), PrjReader.Match(OwnCone, "own.prj"))
            .Apply([new Location(lon, lat)], results);

        results[0].DistanceTo(new Location(x, y)).ShouldBeLessThan(0.001);
    }

    [Fact]
    public void A_datum_that_nobody_knows_is_like_no_other()
    {
        var grid = PrjReader.Match(OwnGrid.Replace("D_ETRS_1989", "D_Unknown", StringComparison.Ordinal), "own.prj");

        grid.Datum.ShouldBe("D_Unknown");
        Refusals.Of(() => GridTransform.Between(ReferenceSystems.Find("EPSG:4258"), grid)).Code.ShouldBe("RR0320");
    }

    /// <summary>A name such as "unknown" says nothing: on two ellipsoids it cannot be one datum.</summary>
    [Fact]
    public void Two_unknown_datums_on_different_figures_are_not_one()
    {
        var one = OwnGrid.Replace("D_ETRS_1989", "D_Unknown", StringComparison.Ordinal);
        var other = one.Replace("298.257222101", "293.465", StringComparison.Ordinal);

        Refusals
            .Of(() => GridTransform.Between(PrjReader.Match(one, "a.prj"), PrjReader.Match(other, "b.prj")))
            .Code.ShouldBe("RR0320");
    }

    private static string Text(string file) => File.ReadAllText(ReferenceFolder.PathOf("crs/wkt/" + file));
}
