using System.Numerics;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Testing.Oracles;

/// <summary>
/// Sites as whole numbers of lattice steps: determinants by the textbook in integers large enough, with no filter and
/// nothing shared with the code under test.
/// </summary>
internal sealed class ExactPlane
{
    private readonly long[] x;
    private readonly long[] y;

    public ExactPlane(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        this.x = Steps(x);
        this.y = Steps(y);
    }

    public int Count => x.Length;

    /// <summary>Twice the signed area of a triangle, in square steps: below 2⁸⁸.</summary>
    public Int128 TwiceArea(int a, int b, int c) =>
        ((Int128)(x[b] - x[a]) * (y[c] - y[a])) - ((Int128)(x[c] - x[a]) * (y[b] - y[a]));

    /// <summary>Positive when d is inside the circle through a, b, c, which turn counter-clockwise.</summary>
    public int InCircle(int a, int b, int c, int d)
    {
        (Int128 ax, Int128 ay, Int128 aa) = Lifted(a, d);
        (Int128 bx, Int128 by, Int128 bb) = Lifted(b, d);
        (Int128 cx, Int128 cy, Int128 cc) = Lifted(c, d);
        BigInteger determinant = (BigInteger)aa * ((bx * cy) - (by * cx));
        determinant += (BigInteger)bb * ((cx * ay) - (cy * ax));
        determinant += (BigInteger)cc * ((ax * by) - (ay * bx));
        return determinant.Sign;
    }

    /// <summary>Order by x, then y.</summary>
    public int Compare(int a, int b) => x[a] == x[b] ? y[a].CompareTo(y[b]) : x[a].CompareTo(x[b]);

    private (Int128 X, Int128 Y, Int128 Square) Lifted(int site, int origin)
    {
        Int128 dx = x[site] - x[origin];
        Int128 dy = y[site] - y[origin];
        return (dx, dy, (dx * dx) + (dy * dy));
    }

    private static long[] Steps(ReadOnlySpan<double> metres)
    {
        var steps = new long[metres.Length];
        for (int i = 0; i < steps.Length; i++)
        {
            double whole = metres[i] / Lattice.StepMetres;
            OracleException.Unless(Math.Floor(whole) == whole, $"Coordinate {i}, {metres[i]:R} m, is off the lattice.");
            steps[i] = (long)whole;
        }

        return steps;
    }
}
