using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// The point as far from three sites, kept as an offset from one of them, so that it is as exact at coordinates around
/// 5,000,000 as at the origin. The error is a few roundings of the circle's radius, however flat the triangle.
/// </summary>
/// <remarks>
/// The offset is taken from the corner across from the longest side, where it is best conditioned, and the determinants
/// are those of W. Kahan with a fused multiply-add, right to two units in the last place (C.-P. Jeannerod, N. Louvet,
/// J.-M. Muller, Mathematics of Computation 82, 2013).
/// </remarks>
[StructLayout(LayoutKind.Auto)]
internal readonly struct Circumcentre
{
    private Circumcentre(double siteX, double siteY, double offsetX, double offsetY)
    {
        SiteX = siteX;
        SiteY = siteY;
        OffsetX = offsetX;
        OffsetY = offsetY;
    }

    public double SiteX { get; }

    public double SiteY { get; }

    public double OffsetX { get; }

    public double OffsetY { get; }

    /// <summary>Of a triangle that turns counter-clockwise, corners on the lattice.</summary>
    public static Circumcentre Of(double ax, double ay, double bx, double by, double cx, double cy)
    {
        double ab = Square(bx - ax, by - ay);
        double bc = Square(cx - bx, cy - by);
        double ca = Square(ax - cx, ay - cy);
        return bc >= ab && bc >= ca ? FromApex(ax, ay, bx, by, cx, cy)
            : ca >= ab ? FromApex(bx, by, cx, cy, ax, ay)
            : FromApex(cx, cy, ax, ay, bx, by);
    }

    /// <summary>a·d − b·c, right to two units in the last place.</summary>
    public static double Determinant(double a, double b, double c, double d)
    {
        double product = b * c;
        double lost = Math.FusedMultiplyAdd(-b, c, product);
        return Math.FusedMultiplyAdd(a, d, -product) + lost;
    }

    private static Circumcentre FromApex(double ax, double ay, double bx, double by, double cx, double cy)
    {
        double ux = bx - ax;
        double uy = by - ay;
        double vx = cx - ax;
        double vy = cy - ay;
        double uu = Square(ux, uy);
        double vv = Square(vx, vy);
        double twice = 2 * Determinant(ux, uy, vx, vy);
        return new Circumcentre(ax, ay, Determinant(uu, uy, vv, vy) / twice, Determinant(ux, uu, vx, vv) / twice);
    }

    private static double Square(double x, double y) => (x * x) + (y * y);
}
