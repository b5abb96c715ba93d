using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>Some steps of a record with gaps over some basins; depths of silent sites are not numbers.</summary>
internal sealed class Block
{
    private readonly Network network;
    private readonly double[] depths;
    private readonly bool[] reports;
    private readonly bool[] wanted;

    private Block(Network network, PolygonBatch basins, double[] depths, bool[] reports, bool[] wanted)
    {
        this.network = network;
        Basins = basins;
        this.depths = depths;
        this.reports = reports;
        this.wanted = wanted;
    }

    /// <summary>What stands where no mean is wanted.</summary>
    public static double Untouched => -7;

    public static double LargestDepth => 100;

    public PolygonBatch Basins { get; }

    public int Steps => reports.Length / network.Count;

    public static Block Of(Network network, int seed, int steps)
    {
        var random = new Random(seed);
        Basin[] basins =
        [
            .. Enumerable
                .Range(0, 24)
                .Select(i =>
                    Basin.For(network, Basin.Kinds[i % Basin.Kinds.Length], Math.Pow(10, (i % 3) - 1), seed ^ i)
                )
                .OfType<Basin>()
                .Where(basin => !basin.IsTooThin),
        ];
        bool[] reporting =
        [
            .. Enumerable
                .Range(0, steps)
                .SelectMany(step => Silence.For(network, Silence.Kinds[step % Silence.Kinds.Length], seed ^ step)),
        ];
        return new Block(
            network,
            Shapes.Batch([.. basins.Select(basin => basin.Rings.ToArray())]),
            [.. reporting.Select(isReporting => isReporting ? random.NextDouble() * LargestDepth : double.NaN)],
            reporting,
            [.. Enumerable.Range(0, steps * basins.Length).Select(_ => random.Next(5) > 0)]
        );
    }

    public bool[] ReportsAt(int step) => reports[(step * network.Count)..((step + 1) * network.Count)];

    public double[] DepthsAt(int step) => depths[(step * network.Count)..((step + 1) * network.Count)];

    public bool IsWanted(int step, int basin) => wanted[(step * Basins.Count) + basin];

    public double[] Means(long budgetBytes, int threads) =>
        Means(ReportingWeights.Of(network.X, network.Y, Basins, threads, budgetBytes), threads);

    public double[] Means(ReportingWeights weights, int threads)
    {
        var means = new double[Steps * Basins.Count];
        Array.Fill(means, Untouched);
        weights.Means(Steps, depths, reports, wanted, means, threads);
        return means;
    }

    /// <summary>The same steps in another order, and where each stood before.</summary>
    public (Block Shuffled, int[] Before) Shuffle(int seed)
    {
        int[] before = [.. Enumerable.Range(0, Steps)];
        new Random(seed).Shuffle(before);
        return (
            new Block(
                network,
                Basins,
                [.. before.SelectMany(DepthsAt)],
                [.. before.SelectMany(ReportsAt)],
                [.. before.SelectMany(step => Enumerable.Range(0, Basins.Count).Select(basin => IsWanted(step, basin)))]
            ),
            before
        );
    }

    /// <summary>The same record of the same sites in another order.</summary>
    public Block Renumber(int seed)
    {
        (double[] x, double[] y, int[] before) = network.Shuffled(seed);
        return new Block(
            Network.Of([.. x.Zip(y)]),
            Basins,
            [.. Enumerable.Range(0, Steps).SelectMany(step => before.Select(site => DepthsAt(step)[site]))],
            [.. Enumerable.Range(0, Steps).SelectMany(step => before.Select(site => ReportsAt(step)[site]))],
            wanted
        );
    }
}
