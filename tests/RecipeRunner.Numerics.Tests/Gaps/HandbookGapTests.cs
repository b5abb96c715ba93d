using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Tests.Support;

namespace RecipeRunner.Numerics.Tests.Gaps;

/// <summary>
/// The squares, lines and circles of tests/reference/handbook with gauges silent. Each set of weights is derived in two ways: from
/// the walls of those that are left, and as what each had with all reporting and what it inherits.
/// </summary>
public sealed class HandbookGapTests
{
    /// <summary>
    /// Square, gauges at the corners and the middle (1/8 each, 1/2). Without the middle: the quarters between x = 1/2 and y = 1/2;
    /// or 1/8 and a quarter of the middle's half. That is the handbook's own case of four corners.
    /// Without the corner (1, 1) too: from the walls, the handbook's case of three corners, 1/4, 3/8, 3/8; or a quarter each, and the
    /// quarter of (1, 1) halved by the wall x = y between its two neighbours.
    /// Without (1, 1) alone of the five: its triangle beyond x + y = 3/2 falls whole to the middle, as the walls x − y = 1/2 and
    /// y − x = 1/2 of the other corners touch it in one point each, 1/2 and 1/8; or one less the triangles of the three corners.
    /// </summary>
    [Theory]
    [InlineData("geo-square-corners-centre", "11110", "1/4 1/4 1/4 1/4 0")]
    [InlineData("geo-square-corners-centre", "11100", "1/4 3/8 3/8 0 0")]
    [InlineData("geo-square-corners-centre", "11101", "1/8 1/8 1/8 0 5/8")]
    [InlineData("geo-square-corners-centre", "10000", "1 0 0 0 0")]
    [InlineData("geo-square-corners", "1110", "1/4 3/8 3/8 0")]
    [InlineData("geo-square-corners", "1001", "1/2 0 0 1/2")]
    public void Squares(string id, string reports, string weights) => ShouldBe(id, reports, weights);

    /// <summary>
    /// A strip from 0 to 10 with gauges at 1, 2, 4, 8: walls at 1.5, 3, 6, weights 3/20, 3/20, 3/10, 2/5. Each wall of those left is
    /// at the middle between them; or the silent one's stretch is parted there: without 2 the wall is at 2.5, and of [1.5, 3] 1/10
    /// goes left and 1/20 right. Without 4, at 5: of [3, 6] 1/5 left, 1/10 right. Without 2 and 4, at 4.5: of [1.5, 6] 3/10, 3/20.
    /// The oblique strip has gauges at 1, 4, 9 of its length of 10 and walls at 2.5 and 6.5.
    /// </summary>
    [Theory]
    [InlineData("geo-collinear", "1011", "1/4 0 7/20 2/5")]
    [InlineData("geo-collinear", "1101", "3/20 7/20 0 1/2")]
    [InlineData("geo-collinear", "1001", "9/20 0 0 11/20")]
    [InlineData("geo-collinear", "0110", "0 3/10 7/10 0")]
    [InlineData("geo-collinear", "0001", "0 0 0 1")]
    [InlineData("geo-collinear-oblique", "101", "1/2 0 1/2")]
    [InlineData("geo-collinear-oblique", "011", "0 13/20 7/20")]
    public void Lines(string id, string reports, string weights) => ShouldBe(id, reports, weights);

    /// <summary>
    /// A circle of 64 or 720 sides with gauges in its middle and at its four ends. Turns by 45 degrees and mirrors at multiples of
    /// 22.5 leave it as it is, so sectors between multiples of 45 degrees are eighths. Without the middle: walls along the two
    /// diagonals, a quarter each. Without the east end as well: north from 0 to 135 degrees, 3/8; or a quarter and half of the east's.
    /// Without east and west: halves on either side of the east-west line.
    /// </summary>
    [Theory]
    [InlineData("geo-circle-64", "01111", "0 1/4 1/4 1/4 1/4")]
    [InlineData("geo-circle-64", "00111", "0 0 3/8 1/4 3/8")]
    [InlineData("geo-circle-720", "01111", "0 1/4 1/4 1/4 1/4")]
    [InlineData("geo-circle-720", "00111", "0 0 3/8 1/4 3/8")]
    [InlineData("geo-circle-720", "00101", "0 0 1/2 0 1/2")]
    public void Circles(string id, string reports, string weights) => ShouldBe(id, reports, weights);

    private static void ShouldBe(string id, string reports, string expected)
    {
        HandbookExample example = HandbookExample.Load().Single(candidate => candidate.Id == id);
        Network network = example.Network;
        ReportingWeights weights = ReportingWeights.Of(network.X, network.Y, Shapes.Batch(example.Rings), 1);

        (int[] sites, double[] found) = weights.Of(0, [.. reports.Select(bit => bit == '1')]);

        double[] all = DrawnAnew.Spread(network.Count, sites, found);
        double[] fractions = [.. expected.Split(' ').Select(Fraction)];
        for (int gauge = 0; gauge < all.Length; gauge++)
        {
            all[gauge].ShouldBe(fractions[gauge], 1e-12, id);
        }
    }

    private static double Fraction(string text)
    {
        string[] parts = text.Split('/');
        double whole = double.Parse(parts[0], System.Globalization.CultureInfo.InvariantCulture);
        return parts.Length == 1
            ? whole
            : whole / double.Parse(parts[1], System.Globalization.CultureInfo.InvariantCulture);
    }
}
