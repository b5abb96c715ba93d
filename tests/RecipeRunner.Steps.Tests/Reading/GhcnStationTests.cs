using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>The station list of GHCN-Daily. Rows: source: NOAA, ghcnd-stations.txt, its first rows; columns: readme.txt, section IV.</summary>
public sealed class GhcnStationTests : IDisposable
{
    private const string List =
        "ACW00011604  17.1167  -61.7833   10.1    ST JOHNS COOLIDGE FLD                       \n"
        + "ACW00011647  17.1333  -61.7833   19.2    ST JOHNS                                    \n"
        + "AE000041196  25.3330   55.5170   34.0    SHARJAH INTER. AIRP            GSN     41196\n"
        + "ASN00001011 -16.0497  124.9500 -999.9    PANTA DOWNS                                 \n";

    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Places_are_in_degrees_and_unknown_elevations_unknown()
    {
        bench.Write("ghcnd-stations.txt", List);
        var network = bench.Verbs.ReadGhcnStations("ghcnd-stations.txt");

        network.ReferenceSystem.Label.ShouldBe("EPSG:4326");
        network.Gauges.ShouldBe([
            new Gauge("ACW00011604", new Location(-61.7833, 17.1167), 10.1),
            new Gauge("ACW00011647", new Location(-61.7833, 17.1333), 19.2),
            new Gauge("AE000041196", new Location(55.517, 25.333), 34),
            new Gauge("ASN00001011", new Location(124.95, -16.0497)),
        ]);
    }

    [Fact]
    public void Only_the_gauges_of_records_are_taken_and_those_absent_told()
    {
        bench.Write(
            "ghcnd-stations.txt",
            List.Replace("ACW00011604  17.1167", "ACW00011604  oops   ", StringComparison.Ordinal)
        );
        bench.Write("rain.csv", "date,AE000041196,AE000041199\n2024-01-01,1,2\n");
        var rain = bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("24:00"));

        bench.Verbs.ReadGhcnStations("ghcnd-stations.txt", of: rain).Gauges.Single().Id.ShouldBe("AE000041196");
        bench.Study.Findings.Single().Code.ShouldBe("RR0283");
        bench.Study.Findings[0].What.ShouldContain("AE000041199");
        bench.Verbs.ReadGhcnStations("ghcnd-stations.txt", ids: ["ACW00011647"]).Gauges.Length.ShouldBe(1);
        Bench
            .Refused(() => bench.Verbs.ReadGhcnStations("ghcnd-stations.txt", ids: ["Q-01"]))[0]
            .Code.ShouldBe("RR0243");
    }

    [Theory]
    [InlineData("ACW00011604  17.1167", "ACW00011604  97.1167", "RR0282", 13)]
    [InlineData("  -61.7833   10.1", " -261.7833   10.1", "RR0282", 22)]
    [InlineData("   10.1 ", "   1O.1 ", "RR0282", 32)]
    [InlineData("ACW00011647", "ACW00011604", "RR0245", 0)]
    [InlineData("AE000041196", "AE0000 1196", "RR0282", 1)]
    [InlineData("   10.1    ST JOHNS COOLIDGE FLD                       ", "", "RR0282", 0)]
    public void Damage_is_refused_at_its_place(string good, string bad, string code, int column)
    {
        bench.Write("ghcnd-stations.txt", List.Replace(good, bad, StringComparison.Ordinal));
        var problem = Bench.Refused(() => bench.Verbs.ReadGhcnStations("ghcnd-stations.txt"))[0];

        (problem.Code, problem.Where.Column).ShouldBe((code, column));
        problem.Where.Line.ShouldBeInRange(1, 3);
    }
}
