using CsCheck;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Numerics.Tests.Triangulation;

/// <summary><i>common practice, no source:</i> what a technician checks on a drawn triangulation, in plain angles.</summary>
public sealed class FactsOfTheTradeTests
{
    private static readonly Gen<Network> Drawn = Gen.Select(
        Gen.Int[4, 60],
        Gen.Int[0, int.MaxValue],
        (count, seed) => Network.Of("uniform", count, 100_000, 0, seed)
    );

    [Fact]
    public void Every_angle_of_the_outline_is_under_180_degrees() =>
        Drawn.Sample(
            network =>
            {
                int[] hull = network.Triangulate().Hull.ToArray();
                for (int i = 0; i < hull.Length; i++)
                {
                    int before = hull[(i + hull.Length - 1) % hull.Length];
                    int after = hull[(i + 1) % hull.Length];
                    Angle(network, after, hull[i], before).ShouldBeInRange(0, 180);
                }
            },
            iter: 300
        );

    [Fact]
    public void No_circumcircle_holds_another_gauge() =>
        Drawn.Sample(
            network =>
            {
                foreach (int[] t in network.Triangulate().Corners.ToArray().Chunk(3))
                {
                    (double x, double y) = Centre(network, t[0], t[1], t[2]);
                    double radius = Distance(x, y, network.X[t[0]], network.Y[t[0]]);
                    for (int site = 0; site < network.Count; site++)
                    {
                        Distance(x, y, network.X[site], network.Y[site]).ShouldBeGreaterThan(radius * (1 - 1e-9));
                    }
                }
            },
            iter: 100
        );

    [Fact]
    public void Opposite_angles_over_180_degrees_are_flipped_and_the_smallest_angle_is_the_larger_one() =>
        Drawn.Sample(
            network =>
            {
                DelaunayTriangulation triangulation = network.Triangulate();
                for (int edge = 0; edge < triangulation.Twins.Length; edge++)
                {
                    int twin = triangulation.Twins[edge];
                    if (twin > edge)
                    {
                        CheckDiagonal(network, triangulation.Corners, edge, twin);
                    }
                }
            },
            iter: 300
        );

    private static void CheckDiagonal(Network network, ReadOnlySpan<int> corners, int edge, int twin)
    {
        (int a, int b) = (corners[edge], corners[twin]);
        int c = corners[(edge / 3 * 3) + ((edge + 2) % 3)];
        int d = corners[(twin / 3 * 3) + ((twin + 2) % 3)];
        double opposite = Angle(network, a, c, b) + Angle(network, b, d, a);
        opposite.ShouldBeLessThan(180 + 1e-6);
        bool isConvex = Angle(network, d, a, c) < 180 && Angle(network, c, b, d) < 180;
        if (isConvex)
        {
            double kept = Math.Min(Smallest(network, a, b, c), Smallest(network, b, a, d));
            double flipped = Math.Min(Smallest(network, a, d, c), Smallest(network, d, b, c));
            kept.ShouldBeGreaterThan(flipped - 1e-6);
        }
    }

    private static double Smallest(Network network, int a, int b, int c) =>
        Math.Min(Angle(network, b, a, c), Math.Min(Angle(network, c, b, a), Angle(network, a, c, b)));

    /// <summary>The angle in degrees, 0 to 360, from a counter-clockwise to b, seen from a point.</summary>
    private static double Angle(Network network, int a, int at, int b)
    {
        double first = Math.Atan2(network.Y[a] - network.Y[at], network.X[a] - network.X[at]);
        double second = Math.Atan2(network.Y[b] - network.Y[at], network.X[b] - network.X[at]);
        double degrees = (second - first) * 180 / Math.PI;
        return degrees < 0 ? degrees + 360 : degrees;
    }

    private static double Distance(double ax, double ay, double bx, double by) =>
        Math.Sqrt(((ax - bx) * (ax - bx)) + ((ay - by) * (ay - by)));

    private static (double X, double Y) Centre(Network network, int a, int b, int c)
    {
        double ux = network.X[b] - network.X[a];
        double uy = network.Y[b] - network.Y[a];
        double vx = network.X[c] - network.X[a];
        double vy = network.Y[c] - network.Y[a];
        double twice = 2 * ((ux * vy) - (uy * vx));
        double uu = (ux * ux) + (uy * uy);
        double vv = (vx * vx) + (vy * vy);
        return (network.X[a] + (((vy * uu) - (uy * vv)) / twice), network.Y[a] + (((ux * vv) - (vx * uu)) / twice));
    }
}
