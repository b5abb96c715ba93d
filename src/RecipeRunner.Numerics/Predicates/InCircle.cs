using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Predicates;

/// <summary>Whether a point lies within the circle through three others; exact for lattice points.</summary>
/// <remarks>Filter: Shewchuk 1997 as in <see cref="Orientation"/>. Then exact integers of twice 128 bits.</remarks>
public static class InCircle
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double Bound = (10 + (96 * UnitRoundoff)) * UnitRoundoff;

    /// <summary>
    /// Positive when p lies inside the circle through a, b, c, which turn counter-clockwise; negative when outside,
    /// zero when on it. With a, b, c clockwise the sign is reversed. All coordinates on the <see cref="Lattice"/>.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int Sign(double ax, double ay, double bx, double by, double cx, double cy, double px, double py)
    {
        double adx = ax - px;
        double ady = ay - py;
        double bdx = bx - px;
        double bdy = by - py;
        double cdx = cx - px;
        double cdy = cy - py;
        double bc = bdx * cdy;
        double cb = cdx * bdy;
        double ca = cdx * ady;
        double ac = adx * cdy;
        double ab = adx * bdy;
        double ba = bdx * ady;
        double aLift = (adx * adx) + (ady * ady);
        double bLift = (bdx * bdx) + (bdy * bdy);
        double cLift = (cdx * cdx) + (cdy * cdy);
        double determinant = (aLift * (bc - cb)) + (bLift * (ca - ac)) + (cLift * (ab - ba));
        double permanent =
            (aLift * (Math.Abs(bc) + Math.Abs(cb)))
            + (bLift * (Math.Abs(ca) + Math.Abs(ac)))
            + (cLift * (Math.Abs(ab) + Math.Abs(ba)));
        double uncertain = Bound * permanent;
        return determinant > uncertain ? 1
            : determinant < -uncertain ? -1
            : ExactSign(adx, ady, bdx, bdy, cdx, cdy);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static int ExactSign(double adx, double ady, double bdx, double bdy, double cdx, double cdy)
    {
        long ax = Lattice.Steps(adx);
        long ay = Lattice.Steps(ady);
        long bx = Lattice.Steps(bdx);
        long by = Lattice.Steps(bdy);
        long cx = Lattice.Steps(cdx);
        long cy = Lattice.Steps(cdy);
        var sum = new WideSum();
        sum.AddProduct(Lift(ax, ay), Cross(bx, by, cx, cy));
        sum.AddProduct(Lift(bx, by), Cross(cx, cy, ax, ay));
        sum.AddProduct(Lift(cx, cy), Cross(ax, ay, bx, by));
        return sum.Sign();
    }

    private static Int128 Lift(long x, long y) => Math.BigMul(x, x) + Math.BigMul(y, y);

    private static Int128 Cross(long ux, long uy, long vx, long vy) => Math.BigMul(ux, vy) - Math.BigMul(uy, vx);

    /// <summary>
    /// A sum of three products of numbers below 2⁸⁸ in three limbs of weight 1, 2⁴⁴ and 2⁸⁸. Each factor is split at
    /// bit 44, so each product of halves is below 2⁸⁸ and no limb comes near 2¹²⁷.
    /// </summary>
    [StructLayout(LayoutKind.Auto)]
    private struct WideSum
    {
        private const int HalfBits = 44;
        private const long HalfMask = (1L << HalfBits) - 1;
        private Int128 high;
        private Int128 middle;
        private Int128 low;

        public void AddProduct(Int128 a, Int128 b)
        {
            long aHigh = (long)(a >> HalfBits);
            long bHigh = (long)(b >> HalfBits);
            long aLow = (long)(ulong)a & HalfMask;
            long bLow = (long)(ulong)b & HalfMask;
            high += Math.BigMul(aHigh, bHigh);
            middle += Math.BigMul(aHigh, bLow) + Math.BigMul(aLow, bHigh);
            low += Math.BigMul(aLow, bLow);
        }

        public readonly int Sign()
        {
            Int128 carried = middle + (low >> HalfBits);
            Int128 top = high + (carried >> HalfBits);
            bool rest = (carried & HalfMask) != 0 || (low & HalfMask) != 0;
            return top != 0 ? Int128.Sign(top)
                : rest ? 1
                : 0;
        }
    }
}
