using System.Globalization;

namespace RecipeRunner.Benchmarks;

/// <summary>One of those that are compared.</summary>
internal sealed record Contender(string Name, Func<Sample> Run);

/// <summary>Runs the tool and its baselines in turn, and prints medians and their ratios as rows of a table.</summary>
internal static class Contest
{
    /// <param name="work">What is done.</param>
    /// <param name="rounds">How often each runs, after one run each that does not count.</param>
    /// <param name="tools">Ways to run the tool.</param>
    /// <param name="baselines">The baselines.</param>
    public static void Run(string work, int rounds, Contender[] tools, Contender[] baselines)
    {
        Contender[] all = [.. tools, .. baselines];
        double[] results = [.. all.Select(contender => contender.Run().Result)];
        for (int i = 1; i < all.Length; i++)
        {
            if (Math.Abs(results[i] - results[0]) > 1e-9 * Math.Abs(results[0]))
            {
                throw new InvalidOperationException($"{work}: {all[i].Name} comes to {results[i]}, not {results[0]}");
            }
        }

        List<double>[] times = [.. all.Select(_ => new List<double>())];
        for (int round = 0; round < rounds; round++)
        {
            for (int i = 0; i < all.Length; i++)
            {
                times[i].Add(all[i].Run().Milliseconds);
            }
        }

        for (int i = 0; i < tools.Length; i++)
        {
            for (int j = tools.Length; j < all.Length; j++)
            {
                Print(work, all[i].Name, Median(times[i]), all[j].Name, Median(times[j]));
            }
        }
    }

    private static void Print(string work, string tool, double toolTime, string baseline, double baselineTime) =>
        Console.Out.Write(
            string.Create(
                CultureInfo.InvariantCulture,
                $"| {work} | {baseline} | {baselineTime:F1} ms | {tool} | {toolTime:F1} ms | {toolTime / baselineTime:F3} | {baselineTime / toolTime:F1} |\n"
            )
        );

    public static double Median(List<double> values)
    {
        values.Sort();
        return (values[(values.Count - 1) / 2] + values[values.Count / 2]) / 2;
    }
}
