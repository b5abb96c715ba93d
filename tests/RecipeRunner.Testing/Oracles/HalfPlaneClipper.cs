namespace RecipeRunner.Testing.Oracles;

/// <summary>
/// Area of a polygon nearest to one site, by cutting its rings with the bisector against every other site in turn: slow,
/// simple, and without triangles, corners or walks.
/// </summary>
/// <remarks>
/// I. Sutherland, G. Hodgman, "Reentrant polygon clipping", Communications of the ACM 17 (1974). Edges that run back on
/// themselves, which it leaves in a non-convex ring, have no area.
/// </remarks>
internal static class HalfPlaneClipper
{
    public static double Area(
        IReadOnlyList<(double X, double Y)[]> rings,
        ReadOnlySpan<double> siteX,
        ReadOnlySpan<double> siteY,
        int site
    )
    {
        double area = 0;
        foreach ((double X, double Y)[] ring in rings)
        {
            (double originX, double originY) = ring[0];
            List<(double X, double Y)> part = [.. ring.Select(p => (p.X - originX, p.Y - originY))];
            for (int other = 0; other < siteX.Length && part.Count > 0; other++)
            {
                double dx = siteX[other] - siteX[site];
                double dy = siteY[other] - siteY[site];
                double length = Math.Sqrt((dx * dx) + (dy * dy));
                double midX = ((siteX[other] + siteX[site]) / 2) - originX;
                double midY = ((siteY[other] + siteY[site]) / 2) - originY;
                part = other == site ? part : Cut(part, dx / length, dy / length, midX, midY);
            }

            area += SignedArea(part);
        }

        return area;
    }

    public static double SignedArea(IReadOnlyList<(double X, double Y)> ring)
    {
        double twice = 0;
        for (int i = 2; i < ring.Count; i++)
        {
            twice +=
                ((ring[i - 1].X - ring[0].X) * (ring[i].Y - ring[0].Y))
                - ((ring[i].X - ring[0].X) * (ring[i - 1].Y - ring[0].Y));
        }

        return twice / 2;
    }

    private static List<(double X, double Y)> Cut(
        List<(double X, double Y)> ring,
        double normalX,
        double normalY,
        double midX,
        double midY
    )
    {
        var kept = new List<(double X, double Y)>(ring.Count + 2);
        for (int i = 0; i < ring.Count; i++)
        {
            (double X, double Y) from = ring[i];
            (double X, double Y) to = ring[(i + 1) % ring.Count];
            double before = ((from.X - midX) * normalX) + ((from.Y - midY) * normalY);
            double beyond = ((to.X - midX) * normalX) + ((to.Y - midY) * normalY);
            if (before <= 0)
            {
                kept.Add(from);
            }

            if ((before < 0 && beyond > 0) || (before > 0 && beyond < 0))
            {
                double share = before / (before - beyond);
                kept.Add((from.X + (share * (to.X - from.X)), from.Y + (share * (to.Y - from.Y))));
            }
        }

        return kept;
    }
}
