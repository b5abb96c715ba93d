using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Testing.Oracles;

/// <summary>Everything that must hold for a Delaunay triangulation, checked exactly.</summary>
/// <remarks>
/// Neighbouring triangles whose circles are empty of each other's far corner have circles empty of every site:
/// B. Delaunay, "Sur la sphère vide", 1934. Triangles that turn counter-clockwise, join edge to edge, have all sites for
/// corners and together the area of a convex hull are a triangulation of it.
/// </remarks>
public static class TriangulationOracle
{
    /// <summary>Checks a triangulation of sites.</summary>
    /// <param name="x">Eastings, as given to the triangulation.</param>
    /// <param name="y">Northings, as given to the triangulation.</param>
    /// <param name="triangulation">The triangulation.</param>
    /// <exception cref="OracleException">Something does not hold.</exception>
    public static void Check(ReadOnlySpan<double> x, ReadOnlySpan<double> y, DelaunayTriangulation triangulation)
    {
        ArgumentNullException.ThrowIfNull(triangulation);
        var plane = new ExactPlane(x, y);
        int[] corners = triangulation.Corners.ToArray();
        int[] twins = triangulation.Twins.ToArray();
        int[] hull = triangulation.Hull.ToArray();
        OracleException.Unless(
            triangulation.SiteCount == plane.Count,
            $"{triangulation.SiteCount} sites are counted, {plane.Count} given."
        );
        CheckIndices(corners, twins, hull, plane.Count);
        if (triangulation.IsCollinear)
        {
            CheckLine(plane, hull);
            return;
        }

        CheckCount(corners, hull, plane.Count);
        CheckTwins(corners, twins);
        CheckHull(plane, corners, twins, hull);
        CheckArea(plane, corners, hull);
        CheckCircles(plane, corners, twins);
    }

    private static void CheckIndices(int[] corners, int[] twins, int[] hull, int sites)
    {
        OracleException.Unless(
            corners.Length % 3 == 0 && twins.Length == corners.Length,
            $"{corners.Length} corners and {twins.Length} twins do not make triangles."
        );
        OracleException.Unless(
            corners.Concat(hull).All(site => site >= 0 && site < sites),
            $"A corner or hull site is not among {sites} sites."
        );
        OracleException.Unless(hull.Distinct().Count() == hull.Length, $"A site is on the hull twice.");
    }

    private static void CheckLine(ExactPlane plane, int[] line)
    {
        OracleException.Unless(line.Length == plane.Count, $"{line.Length} of {plane.Count} sites are in the line.");
        for (int i = 1; i < line.Length; i++)
        {
            OracleException.Unless(
                plane.Compare(line[i - 1], line[i]) < 0 && plane.TwiceArea(line[0], line[^1], line[i]) == 0,
                $"Sites {line[i - 1]} and {line[i]} are out of line or out of order."
            );
        }
    }

    private static void CheckCount(int[] corners, int[] hull, int sites)
    {
        int expected = (2 * sites) - 2 - hull.Length;
        OracleException.Unless(
            corners.Length / 3 == expected,
            $"{corners.Length / 3} triangles; {sites} sites, {hull.Length} of them on the hull, make {expected}."
        );
        int used = corners.Distinct().Count();
        OracleException.Unless(used == sites, $"Only {used} of {sites} sites are corners.");
    }

    private static void CheckTwins(int[] corners, int[] twins)
    {
        for (int edge = 0; edge < twins.Length; edge++)
        {
            int twin = twins[edge];
            bool isTwin =
                twin == -1
                || (
                    twin >= 0
                    && twin < twins.Length
                    && twins[twin] == edge
                    && corners[twin] == corners[Next(edge)]
                    && corners[Next(twin)] == corners[edge]
                );
            OracleException.Unless(isTwin, $"Half-edge {edge} and its twin {twin} do not run against each other.");
        }
    }

    private static void CheckHull(ExactPlane plane, int[] corners, int[] twins, int[] hull)
    {
        Dictionary<int, int> next = Enumerable
            .Range(0, twins.Length)
            .Where(edge => twins[edge] == -1)
            .ToDictionary(edge => corners[edge], edge => corners[Next(edge)]);
        OracleException.Unless(
            next.Count == hull.Length,
            $"{next.Count} half-edges have no twin, {hull.Length} sites are on the hull."
        );
        for (int i = 0; i < hull.Length; i++)
        {
            (int a, int b, int c) = (hull[i], hull[(i + 1) % hull.Length], hull[(i + 2) % hull.Length]);
            OracleException.Unless(
                next.TryGetValue(a, out int follows) && follows == b,
                $"After site {a} the hull names site {b}, the triangles site {follows}."
            );
            OracleException.Unless(plane.TwiceArea(a, b, c) >= 0, $"The hull turns inward at site {b}.");
            OracleException.Unless(
                i == 0 || plane.Compare(hull[0], a) < 0,
                $"The hull does not begin with its first site by x, then y, but site {a} comes before."
            );
        }

        int peaks = Enumerable
            .Range(0, hull.Length)
            .Count(i =>
                plane.Compare(hull[i], hull[(i + 1) % hull.Length]) > 0
                && plane.Compare(hull[i], hull[(i + hull.Length - 1) % hull.Length]) > 0
            );
        OracleException.Unless(peaks == 1, $"The hull goes round {peaks} times.");
    }

    private static void CheckArea(ExactPlane plane, int[] corners, int[] hull)
    {
        Int128 ofTriangles = 0;
        for (int edge = 0; edge < corners.Length; edge += 3)
        {
            Int128 area = plane.TwiceArea(corners[edge], corners[edge + 1], corners[edge + 2]);
            OracleException.Unless(area > 0, $"Triangle {edge / 3} does not turn counter-clockwise.");
            ofTriangles += area;
        }

        Int128 ofHull = 0;
        for (int i = 2; i < hull.Length; i++)
        {
            ofHull += plane.TwiceArea(hull[0], hull[i - 1], hull[i]);
        }

        OracleException.Unless(ofTriangles == ofHull, $"The triangles have {ofTriangles} of the hull's {ofHull}.");
    }

    private static void CheckCircles(ExactPlane plane, int[] corners, int[] twins)
    {
        for (int edge = 0; edge < twins.Length; edge++)
        {
            if (twins[edge] < edge)
            {
                continue;
            }

            (int a, int b, int c) = (corners[edge], corners[Next(edge)], corners[Next(Next(edge))]);
            int d = corners[Next(Next(twins[edge]))];
            int sign = plane.InCircle(a, b, c, d);
            OracleException.Unless(sign <= 0, $"Site {d} is inside the circle through sites {a}, {b} and {c}.");
            int last = plane.Compare(a, b) > 0 ? a : b;
            OracleException.Unless(
                sign < 0 || plane.Compare(last, c) < 0 || plane.Compare(last, d) < 0,
                $"Of sites {a}, {b}, {c}, {d} on one circle the diagonal touches the last by x, then y: site {last}."
            );
        }
    }

    private static int Next(int edge) => edge % 3 == 2 ? edge - 2 : edge + 1;
}
