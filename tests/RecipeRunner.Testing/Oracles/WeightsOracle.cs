using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Testing.Oracles;

/// <summary>Everything that must hold for the weights of polygons.</summary>
public static class WeightsOracle
{
    private const double SumTolerance = 1e-12;
    private const double AreaTolerance = 1e-9;

    /// <summary>
    /// Checks that the weights of every polygon are positive and sum to 1, and its areas to its own; sites ascending, each
    /// once.
    /// </summary>
    /// <exception cref="OracleException">Something does not hold.</exception>
    public static void CheckSums(AreaWeights weights)
    {
        ArgumentNullException.ThrowIfNull(weights);
        for (int polygon = 0; polygon < weights.Count; polygon++)
        {
            double area = weights.PolygonArea(polygon);
            double areaSum = 0;
            double weightSum = 0;
            int before = -1;
            for (int i = 0; i < weights.Sites(polygon).Length; i++)
            {
                int site = weights.Sites(polygon)[i];
                double piece = weights.Areas(polygon)[i];
                double weight = weights.Weights(polygon)[i];
                OracleException.Unless(site > before, $"Polygon {polygon} names site {site} after site {before}.");
                OracleException.Unless(
                    piece > 0 && weight > 0 && Math.Abs((weight * area) - piece) <= AreaTolerance * area,
                    $"Polygon {polygon} gives site {site} the area {piece:R} and the weight {weight:R}, of {area:R} m2."
                );
                before = site;
                areaSum += piece;
                weightSum += weight;
            }

            OracleException.Unless(
                Math.Abs(weightSum - 1) <= SumTolerance,
                $"The weights of polygon {polygon} sum to 1 {weightSum - 1:+0.0E+0;-0.0E+0}."
            );
            OracleException.Unless(
                Math.Abs(areaSum - area) <= AreaTolerance * area,
                $"The areas of polygon {polygon} sum to {areaSum:R} of {area:R} m2."
            );
        }
    }

    /// <summary>
    /// Checks every area of one polygon against half-plane clipping by all sites, which shares no code with the tool: as
    /// many clips as pairs of sites, so for hundreds of sites at most.
    /// </summary>
    /// <param name="x">Eastings of the sites, in metres.</param>
    /// <param name="y">Northings of the sites.</param>
    /// <param name="rings">The polygon's rings, holes clockwise, first points not repeated.</param>
    /// <param name="weights">Weights of some polygons.</param>
    /// <param name="polygon">Which of them it is.</param>
    /// <param name="tolerance">Allowed difference as a share of the polygon's area.</param>
    /// <exception cref="OracleException">An area differs.</exception>
    public static void CheckAgainstClipping(
        ReadOnlySpan<double> x,
        ReadOnlySpan<double> y,
        IReadOnlyList<(double X, double Y)[]> rings,
        AreaWeights weights,
        int polygon,
        double tolerance
    )
    {
        ArgumentNullException.ThrowIfNull(rings);
        ArgumentNullException.ThrowIfNull(weights);
        double whole = rings.Sum(HalfPlaneClipper.SignedArea);
        OracleException.Unless(
            Math.Abs(whole - weights.PolygonArea(polygon)) <= tolerance * whole,
            $"Polygon {polygon} has {whole:R} m2, not {weights.PolygonArea(polygon):R}."
        );
        for (int site = 0; site < x.Length; site++)
        {
            int row = weights.Sites(polygon).IndexOf(site);
            double found = row < 0 ? 0 : weights.Areas(polygon)[row];
            double clipped = HalfPlaneClipper.Area(rings, x, y, site);
            OracleException.Unless(
                Math.Abs(found - clipped) <= tolerance * whole,
                $"Of polygon {polygon} site {site} has {clipped:R} m2 by clipping, not {found:R}."
            );
        }
    }
}
