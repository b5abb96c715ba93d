using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Tests.Support;

namespace RecipeRunner.Numerics.Tests.Gaps;

/// <summary>Shapes whose weights are known in closed form once gauges fall silent; each derived in two ways.</summary>
public sealed class ClosedFormTests
{
    /// <summary>
    /// A disc as a polygon of so many sides. Its corners stand so far beyond the circle that each side takes as much as it
    /// leaves: ½ r² sin δ = ½ R² δ. Parts of the disc then differ by what is between in the few sides that they cut, less than
    /// δ³ = 2.5e-13 of R² each.
    /// </summary>
    private const int Sides = 100_000;

    private const double Radius = 5 * 16384;

    /// <summary>
    /// A square of side 4 with gauges in the middle of its quarters: a quarter each. A silent gauge's quarter falls to its two
    /// neighbours, not to the gauge across, whose cell meets it in one point: halves by symmetry about the diagonal; or, the
    /// bisector of (3, 1) and (1, 3) being y = x, the part below it in [0, 2]² is ∫₀² x dx = 2 of 16, an eighth.
    /// Two silent side by side: the halves left and right of x = 2. Two silent across: what lies on either side of y = x,
    /// 16/2, or a quarter of one's own and two eighths.
    /// </summary>
    [Theory]
    [InlineData("1111", 0.25, 0.25, 0.25, 0.25)]
    [InlineData("0111", 0, 0.375, 0.25, 0.375)]
    [InlineData("1101", 0.25, 0.375, 0, 0.375)]
    [InlineData("0011", 0, 0, 0.5, 0.5)]
    [InlineData("0110", 0, 0.5, 0.5, 0)]
    [InlineData("0101", 0, 0.5, 0, 0.5)]
    [InlineData("0010", 0, 0, 1, 0)]
    public void Square_with_a_gauge_in_each_quarter(string reports, double a, double b, double c, double d)
    {
        double[] x = [1024, 3072, 3072, 1024];
        double[] y = [1024, 1024, 3072, 3072];
        ShouldBe(x, y, Shapes.Box(0, 0, 4096, 4096), reports, [a, b, c, d]);
    }

    /// <summary>
    /// Gauges on a circle around the middle of a disc, and one in the middle. When that is silent, the bisectors of the others
    /// all run through the middle, and each owns the sector between the bisectors to the next on either side: half of the two
    /// angles between. First the angles as differences of directions; then as the arc cosine of the scalar product, 25 · cos.
    /// The gauges are whole points at a distance of 5, so the lattice holds them.
    /// </summary>
    [Theory]
    [InlineData("0111111")]
    [InlineData("0101111")]
    [InlineData("0110101")]
    [InlineData("0010010")]
    public void Disc_with_gauges_around_its_middle_falls_into_sectors(string reports)
    {
        (int X, int Y)[] ring = [(5, 0), (3, 4), (0, 5), (-4, 3), (-3, -4), (4, -3)];
        int[] live = [.. Enumerable.Range(0, ring.Length).Where(i => reports[i + 1] == '1')];
        var expected = new double[ring.Length + 1];
        for (int i = 0; i < live.Length; i++)
        {
            ((int fromX, int fromY), (int toX, int toY)) = (ring[live[i]], ring[live[(i + 1) % live.Length]]);
            double angle = Math.Atan2(toY, toX) - Math.Atan2(fromY, fromX);
            double between = angle > 0 ? angle : angle + (2 * Math.PI);
            double cosine = Math.Acos(((fromX * toX) + (fromY * toY)) / 25.0);
            between.ShouldBe(between > Math.PI ? (2 * Math.PI) - cosine : cosine, 1e-14);
            expected[live[i] + 1] += between / (4 * Math.PI);
            expected[live[(i + 1) % live.Length] + 1] += between / (4 * Math.PI);
        }

        double[] x = [0, .. ring.Select(p => p.X * 16384.0)];
        double[] y = [0, .. ring.Select(p => p.Y * 16384.0)];
        ShouldBe(x, y, Disc(), reports, expected);
    }

    /// <summary>
    /// Gauges in a line through the middle of a disc: each owns a strip between the midpoints to its neighbours in the line.
    /// The part of a disc of radius 1 left of x is F(x) = 1/2 + (asin x + x √(1 − x²)) / π: the antiderivative of the chord,
    /// 2 √(1 − x²), over the area π. Then by Simpson's rule over the angle t with x = sin t, where the chord times dx/dt
    /// is 2 cos² t.
    /// </summary>
    [Theory]
    [InlineData("11111")]
    [InlineData("10111")]
    [InlineData("01011")]
    [InlineData("10001")]
    [InlineData("01110")]
    [InlineData("00110")]
    [InlineData("00001")]
    public void Disc_with_gauges_in_a_line_falls_into_strips(string reports)
    {
        double[] places = [-1.25, -0.5, -0.125, 0.375, 0.75];
        int[] live = [.. Enumerable.Range(0, places.Length).Where(i => reports[i] == '1')];
        var expected = new double[places.Length];
        for (int i = 0; i < live.Length; i++)
        {
            double left = i == 0 ? -1 : (places[live[i - 1]] + places[live[i]]) / 2;
            double right = i == live.Length - 1 ? 1 : (places[live[i]] + places[live[i + 1]]) / 2;
            expected[live[i]] = LeftOf(right) - LeftOf(left);
            expected[live[i]].ShouldBe(StripBySimpson(left, right), 1e-13);
        }

        // The line slopes 3 in 4; the disc looks the same from everywhere.
        double[] x = [.. places.Select(place => 0.8 * 5 * place * 16384)];
        double[] y = [.. places.Select(place => 0.6 * 5 * place * 16384)];
        ShouldBe(x, y, Disc(), reports, expected);
    }

    private static double LeftOf(double x) => 0.5 + ((Math.Asin(x) + (x * Math.Sqrt(1 - (x * x)))) / Math.PI);

    private static double StripBySimpson(double left, double right)
    {
        const int Intervals = 4000;
        (double from, double to) = (Math.Asin(left), Math.Asin(right));
        double step = (to - from) / Intervals;
        double sum = 0;
        for (int i = 0; i <= Intervals; i++)
        {
            double cosine = Math.Cos(from + (i * step));
            sum += (i is 0 or Intervals ? 1 : 2 + (2 * (i % 2))) * 2 * cosine * cosine;
        }

        return sum * step / 3 / Math.PI;
    }

    private static (double X, double Y)[] Disc()
    {
        const double Step = 2 * Math.PI / Sides;
        double corner = Radius * Math.Sqrt(Step / Math.Sin(Step));
        return [.. Enumerable.Range(0, Sides).Select(i => (corner * Math.Cos(i * Step), corner * Math.Sin(i * Step)))];
    }

    private static void ShouldBe(
        double[] x,
        double[] y,
        (double X, double Y)[] basin,
        string reports,
        double[] expected
    )
    {
        ReportingWeights weights = ReportingWeights.Of(x, y, Shapes.Batch([basin]), 1);
        (int[] sites, double[] found) = weights.Of(0, [.. reports.Select(bit => bit == '1')]);
        double[] all = DrawnAnew.Spread(x.Length, sites, found);
        sites.Length.ShouldBe(expected.Count(weight => weight > 0));
        for (int site = 0; site < x.Length; site++)
        {
            all[site].ShouldBe(expected[site], 1e-12);
        }
    }
}
