using System.Numerics;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Testing.Oracles;

/// <summary>
/// Sites as big whole numbers of lattice steps: determinants by the textbook, with no bound, no filter and nothing shared
/// with the code under test.
/// </summary>
internal sealed class ExactPlane
{
    private readonly BigInteger[] x;
    private readonly BigInteger[] y;

    public ExactPlane(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        this.x = Steps(x);
        this.y = Steps(y);
    }

    public int Count => x.Length;

    /// <summary>Twice the signed area of a triangle, in square steps.</summary>
    public BigInteger TwiceArea(int a, int b, int c) =>
        ((x[b] - x[a]) * (y[c] - y[a])) - ((x[c] - x[a]) * (y[b] - y[a]));

    /// <summary>Positive when d is inside the circle through a, b, c, which turn counter-clockwise.</summary>
    public int InCircle(int a, int b, int c, int d)
    {
        (BigInteger ax, BigInteger ay, BigInteger aa) = Lifted(a, d);
        (BigInteger bx, BigInteger by, BigInteger bb) = Lifted(b, d);
        (BigInteger cx, BigInteger cy, BigInteger cc) = Lifted(c, d);
        return ((ax * ((by * cc) - (bb * cy))) - (ay * ((bx * cc) - (bb * cx))) + (aa * ((bx * cy) - (by * cx)))).Sign;
    }

    /// <summary>Order by x, then y.</summary>
    public int Compare(int a, int b) => x[a] == x[b] ? y[a].CompareTo(y[b]) : x[a].CompareTo(x[b]);

    private (BigInteger X, BigInteger Y, BigInteger Square) Lifted(int site, int origin)
    {
        BigInteger dx = x[site] - x[origin];
        BigInteger dy = y[site] - y[origin];
        return (dx, dy, (dx * dx) + (dy * dy));
    }

    private static BigInteger[] Steps(ReadOnlySpan<double> metres)
    {
        var steps = new BigInteger[metres.Length];
        for (int i = 0; i < steps.Length; i++)
        {
            double whole = metres[i] / Lattice.StepMetres;
            OracleException.Unless(Math.Floor(whole) == whole, $"Coordinate {i}, {metres[i]:R} m, is off the lattice.");
            steps[i] = new BigInteger(whole);
        }

        return steps;
    }
}
