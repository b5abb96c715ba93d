namespace RecipeRunner.Benchmarks;

/// <summary>An invented record with gaps: <c>[step * gauges + gauge]</c>.</summary>
internal sealed class GapRecord
{
    private GapRecord(int gauges, bool[] reports, double[] depths)
    {
        Gauges = gauges;
        Reports = reports;
        Depths = depths;
    }

    public int Gauges { get; }

    public bool[] Reports { get; }

    public double[] Depths { get; }

    public int Steps => Reports.Length / Gauges;

    /// <summary>Each value missing by chance.</summary>
    public static GapRecord Random(int gauges, int steps, double missing)
    {
        var random = new Random(5);
        return WithDepths(gauges, [.. Enumerable.Range(0, gauges * steps).Select(_ => random.NextDouble() >= missing)]);
    }

    /// <summary>
    /// A century of days. Three in ten gauges are there from the start, the others open at any time; four in ten close at some
    /// time, 5 to 80 years after they opened. A gauge is silent about twice in three years, a third of these times for a day,
    /// a third for days, a third for weeks or months; besides, one value in 500 is missing.
    /// </summary>
    public static GapRecord Century(int gauges, int steps)
    {
        var random = new Random(1900);
        var reports = new bool[gauges * steps];
        for (int gauge = 0; gauge < gauges; gauge++)
        {
            int opens = random.NextDouble() < 0.3 ? 0 : random.Next(steps);
            int closes = random.NextDouble() < 0.4 ? opens + (int)(365 * (5 + (75 * random.NextDouble()))) : steps;
            for (int step = opens; step < Math.Min(closes, steps); step++)
            {
                reports[(step * gauges) + gauge] = random.Next(500) > 0;
                if (random.Next(550) == 0)
                {
                    step += random.Next(3) switch
                    {
                        0 => 1,
                        1 => random.Next(2, 10),
                        _ => random.Next(10, 120),
                    };
                }
            }
        }

        for (int step = 0; step < steps; step++)
        {
            reports[step * gauges] |= !reports.AsSpan(step * gauges, gauges).Contains(true);
        }

        return WithDepths(gauges, reports);
    }

    /// <summary>The steps that are so many apart.</summary>
    public GapRecord Every(int stride)
    {
        IEnumerable<int> places = Enumerable
            .Range(0, Steps / stride)
            .SelectMany(i => Enumerable.Range(i * stride * Gauges, Gauges));
        return new GapRecord(Gauges, [.. places.Select(i => Reports[i])], [.. places.Select(i => Depths[i])]);
    }

    /// <summary>Depths, then 1 or 0 for whether each is there, as the baselines read them.</summary>
    public void Write(string path)
    {
        using var writer = new BinaryWriter(File.Create(path));
        foreach (double depth in Depths)
        {
            writer.Write(depth);
        }

        foreach (bool isReporting in Reports)
        {
            writer.Write(isReporting ? 1.0 : 0.0);
        }
    }

    private static GapRecord WithDepths(int gauges, bool[] reports)
    {
        var random = new Random(7);
        return new GapRecord(
            gauges,
            reports,
            [.. reports.Select(isReporting => isReporting ? random.NextDouble() * 30 : 0)]
        );
    }
}
