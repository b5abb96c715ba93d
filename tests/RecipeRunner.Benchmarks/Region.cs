using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Benchmarks;

/// <summary>An invented region of 1,000 km by 1,000 km: gauges at random, basins of wavy outline that cover it about once.</summary>
internal sealed class Region
{
    private const double Side = 1_000_000;
    private const int Waves = 9;

    public Region(int gauges, int basins, int pointsEach)
    {
        var random = new Random(20261201);
        X = Coordinates(random, gauges);
        Y = Coordinates(random, gauges);
        BasinX = new double[basins * pointsEach];
        BasinY = new double[basins * pointsEach];
        double radius = Side / Math.Sqrt(basins * Math.PI);
        for (int basin = 0; basin < basins; basin++)
        {
            AddBasin(random, basin * pointsEach, pointsEach, radius);
        }

        RingStarts = [.. Enumerable.Range(0, basins + 1).Select(basin => basin * pointsEach)];
        Batch = new PolygonBatch(BasinX, BasinY, RingStarts, [.. Enumerable.Range(0, basins + 1)]);
    }

    public double[] X { get; }

    public double[] Y { get; }

    public double[] BasinX { get; }

    public double[] BasinY { get; }

    public int[] RingStarts { get; }

    public PolygonBatch Batch { get; }

    /// <summary>A frame that holds every basin.</summary>
    public static Frame Frame { get; } = new(-Side, -Side, 2 * Side, 2 * Side);

    /// <summary>x and y of each gauge, one after the other.</summary>
    public void WritePoints(string path)
    {
        using var writer = new BinaryWriter(File.Create(path));
        for (int i = 0; i < X.Length; i++)
        {
            writer.Write(X[i]);
            writer.Write(Y[i]);
        }
    }

    public IEnumerable<(double[] X, double[] Y)> Basins()
    {
        for (int basin = 0; basin + 1 < RingStarts.Length; basin++)
        {
            Range points = RingStarts[basin]..RingStarts[basin + 1];
            yield return (BasinX[points], BasinY[points]);
        }
    }

    public static IEnumerable<(double[] X, double[] Y)> Outlines(ThiessenCells cells)
    {
        for (int site = 0; site < cells.SiteCount; site++)
        {
            CellOutline outline = cells.Outline(site, Frame);
            yield return (outline.X, outline.Y);
        }
    }

    /// <summary>Rings as the GEOS baseline reads them.</summary>
    public static void WriteRings(string path, IEnumerable<(double[] X, double[] Y)> rings)
    {
        using var writer = new BinaryWriter(File.Create(path));
        foreach ((double[] x, double[] y) in rings)
        {
            writer.Write((double)(x.Length + 1));
            for (int i = 0; i <= x.Length; i++)
            {
                writer.Write(x[i % x.Length]);
                writer.Write(y[i % x.Length]);
            }
        }
    }

    private static double[] Coordinates(Random random, int count) =>
        [.. Enumerable.Range(0, count).Select(_ => Lattice.Snap(random.NextDouble() * Side))];

    private void AddBasin(Random random, int first, int count, double radius)
    {
        (double centreX, double centreY) = (random.NextDouble() * Side, random.NextDouble() * Side);
        double[] phases = [.. Enumerable.Range(0, Waves).Select(_ => random.NextDouble() * 2 * Math.PI)];
        for (int i = 0; i < count; i++)
        {
            double angle = 2 * Math.PI * i / count;
            double wave = Enumerable.Range(0, Waves).Sum(w => Math.Sin(((2 * w) + 2) * angle + phases[w]) / (w + 2));
            double reach = radius * Math.Max(0.1, 1 + (0.5 * wave));
            BasinX[first + i] = Lattice.Snap(centreX + (reach * Math.Cos(angle)));
            BasinY[first + i] = Lattice.Snap(centreY + (reach * Math.Sin(angle)));
        }
    }
}
