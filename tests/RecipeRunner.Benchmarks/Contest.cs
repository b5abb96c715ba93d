using System.Globalization;

namespace RecipeRunner.Benchmarks;

/// <summary>Runs the tool and its baselines in turn, and prints medians and their ratio as a row of a table.</summary>
internal static class Contest
{
    /// <param name="work">What is done.</param>
    /// <param name="rounds">How often each runs, after one run each that does not count.</param>
    /// <param name="tool">The tool.</param>
    /// <param name="baselines">Each baseline's name and run.</param>
    public static void Run(
        string work,
        int rounds,
        Func<Sample> tool,
        params (string Name, Func<Sample> Run)[] baselines
    )
    {
        double expected = tool().Result;
        foreach ((string name, Func<Sample> run) in baselines)
        {
            double result = run().Result;
            if (Math.Abs(result - expected) > 1e-9 * Math.Abs(expected))
            {
                throw new InvalidOperationException($"{work}: {name} comes to {result}, the tool to {expected}");
            }
        }

        var own = new List<double>();
        List<double>[] others = [.. baselines.Select(_ => new List<double>())];
        for (int round = 0; round < rounds; round++)
        {
            own.Add(tool().Milliseconds);
            for (int i = 0; i < baselines.Length; i++)
            {
                others[i].Add(baselines[i].Run().Milliseconds);
            }
        }

        double median = Median(own);
        for (int i = 0; i < baselines.Length; i++)
        {
            double other = Median(others[i]);
            Console.Out.Write(
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"| {work} | {baselines[i].Name} | {other:F0} ms | {median:F1} ms | {median / other:G2} × | {other / median:F1} × |\n"
                )
            );
        }
    }

    public static double Median(List<double> values)
    {
        values.Sort();
        return (values[(values.Count - 1) / 2] + values[values.Count / 2]) / 2;
    }
}
