using System.Runtime.CompilerServices;

namespace RecipeRunner.Numerics.Predicates;

/// <summary>On which side of a directed line a point lies; exact for lattice points.</summary>
/// <remarks>
/// A floating-point filter with a proven bound, then exact integers. The bound is the first one of J. R. Shewchuk,
/// "Adaptive precision floating-point arithmetic and fast robust geometric predicates", Discrete and Computational
/// Geometry 18 (1997) 305-363; on the lattice the differences are exact, so it holds with room to spare.
/// </remarks>
public static class Orientation
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double Bound = (3 + (16 * UnitRoundoff)) * UnitRoundoff;

    /// <summary>
    /// Positive when (cx, cy) lies left of the line from (ax, ay) to (bx, by), negative when right, zero when on it.
    /// All coordinates on the <see cref="Lattice"/>.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int Sign(double ax, double ay, double bx, double by, double cx, double cy)
    {
        double left = (ax - cx) * (by - cy);
        double right = (ay - cy) * (bx - cx);
        double determinant = left - right;
        double uncertain = Bound * (Math.Abs(left) + Math.Abs(right));
        return determinant > uncertain ? 1
            : determinant < -uncertain ? -1
            : ExactSign(ax - cx, ay - cy, bx - cx, by - cy);
    }

    /// <summary>Sign of ux·vy − uy·vx for two lattice vectors of at most 2²⁷ m: products stay below 2⁸⁷.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    private static int ExactSign(double ux, double uy, double vx, double vy) =>
        Int128.Sign(
            Math.BigMul(Lattice.Steps(ux), Lattice.Steps(vy)) - Math.BigMul(Lattice.Steps(uy), Lattice.Steps(vx))
        );
}
