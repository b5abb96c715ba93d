using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// The line between a site's cell and one neighbour's: the bisector of the two sites, given by its unit normal, which
/// points away from the site, and the point midway between the two, which the lattice makes exact. Seen from the
/// neighbour the normal is the exact opposite and the midpoint the same, so both sides agree to the bit where a point is.
/// </summary>
[StructLayout(LayoutKind.Auto)]
internal readonly struct Wall(double normalX, double normalY, double midX, double midY)
{
    public double NormalX { get; } = normalX;

    public double NormalY { get; } = normalY;

    public double MidX { get; } = midX;

    public double MidY { get; } = midY;

    /// <summary>How far beyond the wall a point is, in metres; negative on the site's side.</summary>
    public double DistanceBeyond(double x, double y) => ((x - MidX) * NormalX) + ((y - MidY) * NormalY);

    public static Wall Between(double siteX, double siteY, double otherX, double otherY)
    {
        double dx = otherX - siteX;
        double dy = otherY - siteY;
        double length = Math.Sqrt((dx * dx) + (dy * dy));
        return new Wall(dx / length, dy / length, (siteX + otherX) / 2, (siteY + otherY) / 2);
    }
}
