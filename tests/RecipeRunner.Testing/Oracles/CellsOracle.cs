using RecipeRunner.Numerics.Cells;

namespace RecipeRunner.Testing.Oracles;

/// <summary>Everything that must hold for Thiessen cells.</summary>
public static class CellsOracle
{
    /// <summary>
    /// Checks that neighbours are mutual, and that the outlines within a frame are convex, hold only points nearest to
    /// their own site, and add up to the frame.
    /// </summary>
    /// <param name="x">Eastings of the sites, in metres.</param>
    /// <param name="y">Northings of the sites.</param>
    /// <param name="cells">Their cells.</param>
    /// <param name="frame">A frame of any size and place.</param>
    /// <exception cref="OracleException">Something does not hold.</exception>
    public static void Check(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ThiessenCells cells, Frame frame)
    {
        ArgumentNullException.ThrowIfNull(cells);
        double reach = Reach(x, y, frame);
        double sum = 0;
        for (int site = 0; site < x.Length; site++)
        {
            foreach (int neighbour in cells.Neighbours(site))
            {
                OracleException.Unless(
                    cells.Neighbours(neighbour).Count(site) == 1 && neighbour != site,
                    $"Site {site} has the neighbour {neighbour}, but not once the other way round."
                );
            }

            CellOutline outline = cells.Outline(site, frame);
            CheckOutline(x, y, cells, site, frame, outline, reach);
            sum += outline.Area;
        }

        double area = (frame.MaxX - frame.MinX) * (frame.MaxY - frame.MinY);
        double allowed = (1e-9 * area) + (1e-13 * reach * (frame.MaxX - frame.MinX + frame.MaxY - frame.MinY));
        OracleException.Unless(
            Math.Abs(sum - area) <= allowed,
            $"The outlines have {sum:R} of the frame's {area:R} m2."
        );
    }

    /// <summary>How far anything is from anything: what distances are rounded by.</summary>
    private static double Reach(ReadOnlySpan<double> x, ReadOnlySpan<double> y, Frame frame)
    {
        (double left, double right) = (frame.MinX, frame.MaxX);
        (double bottom, double top) = (frame.MinY, frame.MaxY);
        double largest = 0;
        for (int i = 0; i < x.Length; i++)
        {
            (left, right) = (Math.Min(left, x[i]), Math.Max(right, x[i]));
            (bottom, top) = (Math.Min(bottom, y[i]), Math.Max(top, y[i]));
            largest = Math.Max(largest, Math.Max(Math.Abs(x[i]), Math.Abs(y[i])));
        }

        return right - left + top - bottom + largest;
    }

    private static void CheckOutline(
        ReadOnlySpan<double> x,
        ReadOnlySpan<double> y,
        ThiessenCells cells,
        int site,
        Frame frame,
        CellOutline outline,
        double reach
    )
    {
        double slack = 1e-13 * reach;
        int count = outline.X.Length;
        OracleException.Unless(outline.Y.Length == count && count is 0 or > 2, $"Cell {site} has {count} points.");
        for (int i = 0; i < count; i++)
        {
            (double px, double py) = (outline.X[i], outline.Y[i]);
            OracleException.Unless(frame.Holds(px, py), $"Point {i} of cell {site} is outside the frame.");
            foreach (int neighbour in cells.Neighbours(site))
            {
                double nearer = Distance(px - x[site], py - y[site]) - Distance(px - x[neighbour], py - y[neighbour]);
                OracleException.Unless(
                    nearer <= slack,
                    $"Point {i} of cell {site}, ({px:R}, {py:R}), is {nearer:R} m nearer to site {neighbour}."
                );
            }

            (int j, int k) = ((i + 1) % count, (i + 2) % count);
            (double ax, double ay) = (outline.X[j] - px, outline.Y[j] - py);
            (double bx, double by) = (outline.X[k] - outline.X[j], outline.Y[k] - outline.Y[j]);
            double turn = (ax * by) - (bx * ay);
            OracleException.Unless(
                turn >= -slack * (Distance(ax, ay) + Distance(bx, by)),
                $"Cell {site} is not convex at point {j}."
            );
        }
    }

    private static double Distance(double dx, double dy) => Math.Sqrt((dx * dx) + (dy * dy));
}
