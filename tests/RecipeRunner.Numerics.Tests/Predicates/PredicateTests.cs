using System.Numerics;
using CsCheck;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Numerics.Tests.Predicates;

/// <summary>
/// Signs of determinants: <i>source:</i> the determinants themselves, worked out in System.Numerics.BigInteger.
/// </summary>
public sealed class PredicateTests
{
    private const long Reach = 1L << 42;

    /// <summary>Whole steps: anywhere within reach, or near to it, or few.</summary>
    private static readonly Gen<long> Step = Gen.OneOf(
        Gen.Long[-Reach, Reach],
        Gen.Long[Reach - 3, Reach],
        Gen.Long[-Reach, 3 - Reach],
        Gen.Long[-4, 4],
        Gen.Int[0, 41].Select(bits => 1L << bits)
    );

    private static readonly Gen<(long X, long Y)> Point = Gen.Select(Step, Step);

    [Fact]
    public void Orientation_has_the_sign_of_its_determinant() =>
        Gen.Select(Point, Point, Point)
            .Sample(
                (a, b, c) =>
                    Orientation.Sign(M(a.X), M(a.Y), M(b.X), M(b.Y), M(c.X), M(c.Y)).ShouldBe(ExactTurn(a, b, c)),
                iter: 20_000
            );

    [Fact]
    public void Orientation_sees_the_smallest_turn_over_the_longest_way()
    {
        // The two far ends of a diagonal and a point one step off its middle: double arithmetic gives zero or either sign.
        foreach ((long dx, long dy) in ((long, long)[])[(0, 0), (1, 0), (0, 1), (-1, 0), (0, -1)])
        {
            (long X, long Y) middle = (dx + 1, dy + 1);
            Orientation
                .Sign(M(-Reach), M(-Reach), M(Reach), M(Reach), M(middle.X), M(middle.Y))
                .ShouldBe(Math.Sign(dy - dx));
        }
    }

    [Fact]
    public void InCircle_has_the_sign_of_its_determinant() =>
        Gen.Select(Point, Point, Point, Point)
            .Sample((a, b, c, d) => Sign(a, b, c, d).ShouldBe(ExactCircle(a, b, c, d)), iter: 20_000);

    [Fact]
    public void InCircle_sees_one_step_on_the_largest_circle()
    {
        (long X, long Y) Scaled(long x, long y) => (x * (Reach / 5), y * (Reach / 5));
        (long X, long Y) a = Scaled(5, 0);
        (long X, long Y) b = Scaled(3, 4);
        (long X, long Y) c = Scaled(-4, 3);
        (long X, long Y) d = Scaled(0, -5);
        Sign(a, b, c, d).ShouldBe(0);
        Sign(a, b, c, (d.X, d.Y + 1)).ShouldBe(1);
        Sign(a, b, c, (d.X, d.Y - 1)).ShouldBe(-1);
        Sign(b, a, c, (d.X, d.Y + 1)).ShouldBe(-1);
    }

    private static double M(long steps) => steps * Lattice.StepMetres;

    private static int Sign((long X, long Y) a, (long X, long Y) b, (long X, long Y) c, (long X, long Y) d) =>
        InCircle.Sign(M(a.X), M(a.Y), M(b.X), M(b.Y), M(c.X), M(c.Y), M(d.X), M(d.Y));

    private static int ExactTurn((long X, long Y) a, (long X, long Y) b, (long X, long Y) c) =>
        (((BigInteger)(b.X - a.X) * (c.Y - a.Y)) - ((BigInteger)(c.X - a.X) * (b.Y - a.Y))).Sign;

    private static int ExactCircle((long X, long Y) a, (long X, long Y) b, (long X, long Y) c, (long X, long Y) d)
    {
        (BigInteger X, BigInteger Y, BigInteger Z) Lift((long X, long Y) p)
        {
            BigInteger x = p.X - d.X;
            BigInteger y = p.Y - d.Y;
            return (x, y, (x * x) + (y * y));
        }

        (BigInteger X, BigInteger Y, BigInteger Z) u = Lift(a);
        (BigInteger X, BigInteger Y, BigInteger Z) v = Lift(b);
        (BigInteger X, BigInteger Y, BigInteger Z) w = Lift(c);
        return (
            (u.X * ((v.Y * w.Z) - (v.Z * w.Y)))
            - (u.Y * ((v.X * w.Z) - (v.Z * w.X)))
            + (u.Z * ((v.X * w.Y) - (v.Y * w.X)))
        ).Sign;
    }
}
