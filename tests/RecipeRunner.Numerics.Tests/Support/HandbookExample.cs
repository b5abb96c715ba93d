using System.Globalization;
using System.Text.Json;
using RecipeRunner.Testing;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>
/// A shape whose weights are plain fractions: <i>source:</i> tests/reference/handbook, constructed there, each computed by two
/// methods.
/// </summary>
internal sealed record HandbookExample(
    string Id,
    double[][][][] Parts,
    double[][] Gauges,
    double[] Weights,
    double Area,
    double StatedTolerance
)
{
    /// <summary>The lattice holds gauges on whole 1024ths of the unit; others it moves by 1e-8 of the unit.</summary>
    public double Tolerance => Gauges.All(p => p.All(c => Math.Round(c * 1024) == c * 1024)) ? StatedTolerance : 1e-8;

    public double Scale => Gauges.Max(p => p.Max(Math.Abs)) > 1e4 ? 1 : 1024;

    /// <summary>The gauges. The example's unit is taken for a kilometre, so that the lattice does not show.</summary>
    public Network Network => Network.Of([.. Gauges.Select(p => (p[0] * Scale, p[1] * Scale))]);

    /// <summary>The basin's rings, outer ones counter-clockwise.</summary>
    public (double X, double Y)[][] Rings =>
        [.. Parts.SelectMany(part => part.Select((ring, i) => RingOf(ring, Scale, isHole: i > 0)))];

    /// <summary>All of them.</summary>
    public static List<HandbookExample> Load()
    {
        using var document = JsonDocument.Parse(
            File.ReadAllText(ReferenceFolder.PathOf("handbook/worked_examples.json"))
        );
        return
        [
            .. document
                .RootElement.EnumerateArray()
                .Where(row => row.GetProperty("kind").GetString() is "thiessen_geometry" or "thiessen_geometry_circle")
                .Select(Of),
        ];
    }

    private static HandbookExample Of(JsonElement row)
    {
        JsonElement inputs = row.GetProperty("inputs");
        JsonElement expected = row.GetProperty("expected");
        double[][][][] parts = inputs.TryGetProperty("circle", out JsonElement circle)
            ?
            [
                [PolygonOf(circle)],
            ]
            : inputs.GetProperty("basin_parts").Deserialize<double[][][][]>().ShouldNotBeNull();
        return new HandbookExample(
            row.GetProperty("id").GetString().ShouldNotBeNull(),
            parts,
            inputs.GetProperty("gauges").Deserialize<double[][]>().ShouldNotBeNull(),
            expected.GetProperty("weights").Deserialize<double[]>().ShouldNotBeNull(),
            expected.TryGetProperty("area", out JsonElement area) ? area.GetDouble() : AreaOf(circle),
            double.Parse(
                row.GetProperty("tolerance").GetString().ShouldNotBeNull().Split(' ')[0],
                CultureInfo.InvariantCulture
            )
        );
    }

    private static double[][] PolygonOf(JsonElement circle)
    {
        int count = circle.GetProperty("n").GetInt32();
        double radius = circle.GetProperty("r").GetDouble();
        (double x, double y) = (circle.GetProperty("cx").GetDouble(), circle.GetProperty("cy").GetDouble());
        return
        [
            .. Enumerable
                .Range(0, count)
                .Select(k => 2 * Math.PI * k / count)
                .Select(angle => (double[])[x + (radius * Math.Cos(angle)), y + (radius * Math.Sin(angle))]),
        ];
    }

    private static double AreaOf(JsonElement circle)
    {
        int count = circle.GetProperty("n").GetInt32();
        double radius = circle.GetProperty("r").GetDouble();
        return count / 2.0 * radius * radius * Math.Sin(2 * Math.PI / count);
    }

    private static (double X, double Y)[] RingOf(double[][] points, double scale, bool isHole)
    {
        IEnumerable<double[]> open = points[0].SequenceEqual(points[^1]) ? points.SkipLast(1) : points;
        (double X, double Y)[] ring = Shapes.CounterClockwise([.. open.Select(p => (p[0] * scale, p[1] * scale))]);
        return isHole ? [.. ring.Reverse()] : ring;
    }
}
