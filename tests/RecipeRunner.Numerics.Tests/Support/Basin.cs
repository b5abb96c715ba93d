using CsCheck;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>A polygon that is hard in one way or another for a given network.</summary>
internal sealed class Basin
{
    private Basin(string name, List<(double X, double Y)[]> rings)
    {
        Name = name;
        Rings = rings;
    }

    public static string[] Kinds { get; } =
    ["star", "star with a hole", "hole and island", "box on gauges", "triangle of gauges", "sliver", "cell", "comb"];

    /// <summary>How to make a basin: its kind, its size in network widths, and a seed.</summary>
    public static Gen<(string Kind, double Size, int Seed)> Any { get; } =
        Gen.Select(
            Gen.Int[0, Kinds.Length - 1],
            Gen.Double[-4, 3],
            Gen.Int[0, int.MaxValue],
            (kind, exponent, seed) => (Kinds[kind], Math.Pow(10, exponent), seed)
        );

    public string Name { get; }

    public List<(double X, double Y)[]> Rings { get; }

    public double Perimeter => Rings.Sum(ring => ring.Select((p, i) => Distance(p, ring[(i + 1) % ring.Length])).Sum());

    public double Area => Rings.Sum(SignedArea);

    /// <summary>Thinner than AreaWeights promises to weigh, or than the digits of its coordinates can tell to 1e-10 of its area.</summary>
    public bool IsTooThin => Area < 1e-7 * Perimeter * Perimeter || LastDigit * Perimeter > 1e-10 * Area;

    private double LastDigit =>
        Rings
            .SelectMany(ring => ring)
            .Select(p =>
                Math.BitIncrement(Math.Max(Math.Abs(p.X), Math.Abs(p.Y))) - Math.Max(Math.Abs(p.X), Math.Abs(p.Y))
            )
            .Max();

    public PolygonBatch Batch => Shapes.Batch([.. Rings]);

    /// <summary>A basin for a network; null when this network has none of the kind.</summary>
    public static Basin? For(Network network, string kind, double size, int seed)
    {
        var random = new Random(seed);
        double extent = network.Extent * size;
        (double X, double Y) centre = (
            network.X.Min() + (((random.NextDouble() * 1.5) - 0.25) * network.Extent),
            network.Y.Min() + (((random.NextDouble() * 1.5) - 0.25) * network.Extent)
        );
        List<(double X, double Y)[]> rings = kind switch
        {
            "star" => [Star(centre, extent, random)],
            "star with a hole" => WithHole(Star(centre, extent, random), centre),
            "hole and island" => WithIsland(Star(centre, extent, random), centre),
            "box on gauges" => OnGauges(network, random),
            "triangle of gauges" => Triangle(network, random),
            "sliver" => [Sliver(centre, extent, random)],
            "cell" => Cell(network, new Random(seed).Next(network.Count)),
            "comb" => [Comb(centre, extent, 2 + random.Next(20))],
            _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "no such kind"),
        };
        var basin = new Basin($"{kind} {size:G3} widths, seed {seed}", rings);
        bool isInReach = rings.All(ring => ring.All(p => Math.Max(Math.Abs(p.X), Math.Abs(p.Y)) < Lattice.ReachMetres));
        return rings.Count > 0 && basin.Area > 0 && isInReach ? basin : null;
    }

    public override string ToString() => Name;

    /// <summary>How far anything in the network or the basin is from anything.</summary>
    public double ReachIn(Network network)
    {
        IEnumerable<double> x = network.X.Concat(Rings.SelectMany(ring => ring.Select(p => p.X)));
        IEnumerable<double> y = network.Y.Concat(Rings.SelectMany(ring => ring.Select(p => p.Y)));
        return x.Max() - x.Min() + y.Max() - y.Min();
    }

    private static (double X, double Y)[] Star((double X, double Y) centre, double size, Random random)
    {
        int count = 3 + random.Next(60);
        return
        [
            .. Enumerable
                .Range(0, count)
                .Select(i =>
                {
                    double radius = size * (0.2 + random.NextDouble());
                    double angle = 2 * Math.PI * i / count;
                    return (centre.X + (radius * Math.Cos(angle)), centre.Y + (radius * Math.Sin(angle)));
                }),
        ];
    }

    private static List<(double X, double Y)[]> WithHole((double X, double Y)[] ring, (double X, double Y) centre) =>
        [ring, [.. Scaled(ring, centre, 0.5).Reverse()]];

    private static List<(double X, double Y)[]> WithIsland((double X, double Y)[] ring, (double X, double Y) centre) =>
        [.. WithHole(ring, centre), Scaled(ring, centre, 0.25)];

    private static (double X, double Y)[] Scaled((double X, double Y)[] ring, (double X, double Y) centre, double by) =>
        [.. ring.Select(p => (centre.X + (by * (p.X - centre.X)), centre.Y + (by * (p.Y - centre.Y))))];

    private static List<(double X, double Y)[]> OnGauges(Network network, Random random)
    {
        (int a, int b) = (random.Next(network.Count), random.Next(network.Count));
        (double left, double right) = (Math.Min(network.X[a], network.X[b]), Math.Max(network.X[a], network.X[b]));
        (double low, double high) = (Math.Min(network.Y[a], network.Y[b]), Math.Max(network.Y[a], network.Y[b]));
        return left < right && low < high ? [Shapes.Box(left, low, right, high)] : [];
    }

    private static List<(double X, double Y)[]> Triangle(Network network, Random random)
    {
        (double X, double Y)[] ring =
        [
            .. Enumerable.Range(0, 3).Select(_ => random.Next(network.Count)).Select(i => (network.X[i], network.Y[i])),
        ];
        return SignedArea(ring) switch
        {
            > 0 => [ring],
            < 0 =>
            [
                [.. ring.Reverse()],
            ],
            _ => [],
        };
    }

    private static (double X, double Y)[] Sliver((double X, double Y) centre, double length, Random random)
    {
        double angle = random.Next(3) == 0 ? 0 : random.NextDouble() * 7;
        double width = length * Math.Pow(10, -6 * random.NextDouble());
        (double ux, double uy) = (Math.Cos(angle), Math.Sin(angle));
        (double X, double Y) At(double along, double across) =>
            (centre.X + (along * ux) - (across * uy), centre.Y + (along * uy) + (across * ux));
        return [At(0, 0), At(length, 0), At(length, width), At(0, width)];
    }

    /// <summary>A cell's own outline: its boundary runs along walls and through their ends.</summary>
    private static List<(double X, double Y)[]> Cell(Network network, int site)
    {
        double margin = network.Extent * 0.1;
        var frame = new Frame(
            network.X.Min() - margin,
            network.Y.Min() - margin,
            network.X.Max() + margin,
            network.Y.Max() + margin
        );
        CellOutline outline = network.Cells().Outline(site, frame);
        return outline.IsEmpty
            ? []
            :
            [
                [.. outline.X.Zip(outline.Y)],
            ];
    }

    /// <summary>Long teeth side by side.</summary>
    private static (double X, double Y)[] Comb((double X, double Y) centre, double size, int teeth)
    {
        double pitch = size / teeth;
        var ring = new List<(double X, double Y)> { (centre.X + size, centre.Y + size), (centre.X, centre.Y + size) };
        for (int tooth = 0; tooth < teeth; tooth++)
        {
            double left = centre.X + (tooth * pitch);
            ring.Add((left, centre.Y));
            ring.Add((left + (pitch / 2), centre.Y));
            ring.Add((left + (pitch / 2), centre.Y + (0.9 * size)));
            ring.Add((left + (pitch * 0.9), centre.Y + (0.9 * size)));
        }

        return [.. ring];
    }

    private static double SignedArea((double X, double Y)[] ring)
    {
        double twice = 0;
        for (int i = 2; i < ring.Length; i++)
        {
            twice +=
                ((ring[i - 1].X - ring[0].X) * (ring[i].Y - ring[0].Y))
                - ((ring[i].X - ring[0].X) * (ring[i - 1].Y - ring[0].Y));
        }

        return twice / 2;
    }

    private static double Distance((double X, double Y) a, (double X, double Y) b) =>
        Math.Sqrt(((a.X - b.X) * (a.X - b.X)) + ((a.Y - b.Y) * (a.Y - b.Y)));
}
