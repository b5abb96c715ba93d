using System.Globalization;
using CsCheck;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>Sites on the lattice, each place once, of an arrangement that is hard in one way or another.</summary>
internal sealed class Network
{
    /// <summary>Whole points on the circle of radius 1105 around zero, 36 in the first octant and its seven images.</summary>
    private static readonly (int X, int Y)[] OnCircle =
    [
        .. from x in Enumerable.Range(-1105, 2211)
        from y in Enumerable.Range(-1105, 2211)
        where (x * x) + (y * y) == 1105 * 1105
        select (x, y),
    ];

    private Network(string name, IEnumerable<(double X, double Y)> places)
    {
        Name = name;
        (double X, double Y)[] distinct = [.. places.Select(p => (Lattice.Snap(p.X), Lattice.Snap(p.Y))).Distinct()];
        X = [.. distinct.Select(p => p.X)];
        Y = [.. distinct.Select(p => p.Y)];
    }

    public static string[] Kinds { get; } =
    ["uniform", "grid", "jittered grid", "circle", "clusters", "line", "nearly a line", "parabola", "ring and centre"];

    /// <summary>Networks of all kinds, of 1 to 80 sites, 1 mm to 10,000 km wide, at zero or around 5,000,000.</summary>
    public static Gen<Network> Any { get; } =
        Gen.Select(
            Gen.Int[0, Kinds.Length - 1],
            Gen.Int[1, 80],
            Gen.Double[-3, 7],
            Gen.Bool,
            Gen.Int[0, int.MaxValue],
            (kind, count, exponent, isFar, seed) =>
                Of(Kinds[kind], count, Math.Pow(10, exponent), isFar ? 5_000_000 : 0, seed)
        );

    public string Name { get; }

    public double[] X { get; }

    public double[] Y { get; }

    public int Count => X.Length;

    /// <summary>Width or height, whichever is more, and at least a metre.</summary>
    public double Extent => Math.Max(1, Math.Max(X.Max() - X.Min(), Y.Max() - Y.Min()));

    public static Network Of(string kind, int count, double extent, double offset, int seed)
    {
        var random = new Random(seed);
        string name = string.Create(
            CultureInfo.InvariantCulture,
            $"{kind}, {count} sites, {extent:G3} m wide at {offset}, seed {seed}"
        );
        IEnumerable<(double X, double Y)> unit = Unit(kind, count, random);
        return new Network(name, unit.Select(p => ((p.X * extent) + offset, (p.Y * extent) + offset)));
    }

    public static Network Of(params (double X, double Y)[] places) => new("given places", places);

    public DelaunayTriangulation Triangulate() => DelaunayTriangulation.Of(X, Y);

    public ThiessenCells Cells() => ThiessenCells.Of(Triangulate());

    /// <summary>The same places in another order, and where each stood before.</summary>
    public (double[] X, double[] Y, int[] Before) Shuffled(int seed)
    {
        int[] before = [.. Enumerable.Range(0, Count)];
        new Random(seed).Shuffle(before);
        return ([.. before.Select(i => X[i])], [.. before.Select(i => Y[i])], before);
    }

    public override string ToString() => Name;

    private static IEnumerable<(double X, double Y)> Unit(string kind, int count, Random random)
    {
        int side = (int)Math.Ceiling(Math.Sqrt(count));
        // A power of two keeps grids exact after scaling by one, and inexact after scaling by anything else: both happen.
        double step = 1.0 / (1 << (int)Math.Ceiling(Math.Log2(side + 1)));
        return kind switch
        {
            "uniform" => Repeat(count, _ => (random.NextDouble(), random.NextDouble())),
            "grid" => Repeat(count, i => (i % side * step, i / side * step)),
            "jittered grid" => Repeat(
                count,
                i => ((i % side * step) + Jitter(random, 1e-6), (i / side * step) + Jitter(random, 1e-6))
            ),
            "circle" => Repeat(count, _ => Circle(random)),
            "clusters" => Clusters(count, random),
            "line" => Repeat(count, i => (i * step / side, i * step / side * 0.5)),
            "nearly a line" => Repeat(count, i => (i * step / side, Jitter(random, 1e-9))),
            "parabola" => Repeat(count, i => (i * step / side, i * step / side * (i * step / side))),
            "ring and centre" => Repeat(count, i => i == 0 ? (0.0, 0.0) : Circle(random)),
            _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "no such kind"),
        };
    }

    private static IEnumerable<(double X, double Y)> Repeat(int count, Func<int, (double X, double Y)> place) =>
        [.. Enumerable.Range(0, count).Select(place)];

    /// <summary>Exactly on one circle when the extent is a whole number of 1105 times the lattice's step.</summary>
    private static (double X, double Y) Circle(Random random)
    {
        (int x, int y) = OnCircle[random.Next(OnCircle.Length)];
        return (x / 1105.0, y / 1105.0);
    }

    private static IEnumerable<(double X, double Y)> Clusters(int count, Random random)
    {
        IEnumerable<(double X, double Y)> centres = Repeat(3, _ => (random.NextDouble(), random.NextDouble()));
        (double X, double Y)[] at = [.. centres];
        return Repeat(
            count,
            _ =>
            {
                (double cx, double cy) = at[random.Next(at.Length)];
                double spread = Math.Pow(10, -1 - (5 * random.NextDouble()));
                return (cx + Jitter(random, spread), cy + Jitter(random, spread));
            }
        );
    }

    private static double Jitter(Random random, double size) => ((2 * random.NextDouble()) - 1) * size;
}
