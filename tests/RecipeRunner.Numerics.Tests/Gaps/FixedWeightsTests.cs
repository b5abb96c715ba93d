using System.Text.Json;
using CsCheck;
using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Testing;

namespace RecipeRunner.Numerics.Tests.Gaps;

public sealed class FixedWeightsTests
{
    /// <summary>
    /// <i>source:</i> tests/reference/handbook, the weighted means of textbooks quoted from memory there; expected values
    /// computed from the inputs by golden_handbook.py.
    /// </summary>
    [Theory]
    [InlineData("lkp-thiessen")]
    [InlineData("cmm-thiessen")]
    [InlineData("sub-thiessen-table")]
    public void Textbook_means_come_out(string id)
    {
        using var document = JsonDocument.Parse(
            File.ReadAllText(ReferenceFolder.PathOf("handbook/worked_examples.json"))
        );
        JsonElement row = document.RootElement.EnumerateArray().Single(r => r.GetProperty("id").GetString() == id);
        double[] depths = Numbers(row.GetProperty("inputs").GetProperty("values"));
        double[] weights = Numbers(row.GetProperty("expected").GetProperty("weights"));
        var table = new FixedWeights(
            depths.Length,
            [0, depths.Length],
            [.. Enumerable.Range(0, depths.Length)],
            weights
        );
        Result result = Result.Of(table, 1, depths, [.. depths.Select(_ => true)], 1);
        double mean = row.GetProperty("expected").GetProperty("mean").GetDouble();
        result.Means[0].ShouldBe(mean, 1e-9 * mean);
        result.Reporting.ShouldBe([depths.Length]);
        result.Shares.ShouldBe([1]);
    }

    /// <summary>
    /// The textbook table of three areas with a gauge missing, by hand: weights 1/2, 1/4, 1/4 and depths 10, 20, -: the two
    /// that report have 3/4, and (10/2 + 20/4) / (3/4) = 40/3; or by areas 2 and 1 of 3: 10 · 2/3 + 20 · 1/3 = 40/3.
    /// </summary>
    [Fact]
    public void Where_some_are_silent_the_rest_is_rescaled()
    {
        var table = new FixedWeights(3, [0, 3, 4], [0, 1, 2, 2], [0.5, 0.25, 0.25, 1]);
        double[] depths = [10, 20, double.NaN, double.NaN, double.NaN, 8, double.NaN, double.NaN, double.NaN];
        bool[] reports = [true, true, false, false, false, true, false, false, false];
        Result result = Result.Of(table, 3, depths, reports, 1);
        result.Means[0].ShouldBe(40.0 / 3, 1e-14);
        result.Means[1..].ShouldBe([Result.Untouched, 8, 8, Result.Untouched, Result.Untouched]);
        result.Reporting.ShouldBe([2, 0, 1, 1, 0, 0]);
        result.Shares.ShouldBe([0.75, 0, 0.25, 1, 0, 0]);
    }

    /// <summary>
    /// <i>source:</i> sums in decimal arithmetic, 28 digits, by their definition.
    /// </summary>
    [Fact]
    public void Any_block_has_the_sums_of_decimal_arithmetic_and_the_same_bits_for_any_number_of_threads() =>
        Gen.Select(Gen.Int[1, 40], Gen.Int[0, 60], Gen.Int[1, 9], Gen.Int[0, 3], Gen.Int[0, int.MaxValue])
            .Sample(
                (sites, steps, polygons, silence, seed) =>
                {
                    var random = new Random(seed);
                    int[][] owners = [.. Enumerable.Range(0, polygons).Select(_ => Owners(random, sites))];
                    double[][] weights = [.. owners.Select(row => Weights(random, row.Length))];
                    int[] starts = [0, .. owners.Select((_, i) => owners[..(i + 1)].Sum(row => row.Length))];
                    var table = new FixedWeights(
                        sites,
                        starts,
                        [.. owners.SelectMany(row => row)],
                        [.. weights.SelectMany(row => row)]
                    );
                    bool[] reports =
                    [
                        .. Enumerable.Range(0, steps * sites).Select(_ => random.Next(10) >= 3 * silence),
                    ];
                    double[] depths = [.. reports.Select(isOn => isOn ? random.NextDouble() * 100 : double.NaN)];
                    Result result = Result.Of(table, steps, depths, reports, 1);
                    for (int cell = 0; cell < steps * polygons; cell++)
                    {
                        int step = cell / polygons;
                        int polygon = cell % polygons;
                        (decimal? mean, int count, decimal share) = Plain(
                            owners[polygon],
                            weights[polygon],
                            depths[(step * sites)..((step + 1) * sites)],
                            reports[(step * sites)..((step + 1) * sites)]
                        );
                        result.Reporting[cell].ShouldBe(count);
                        result.Shares[cell].ShouldBe((double)share, 1e-14);
                        result.Means[cell].ShouldBe((double)(mean ?? (decimal)Result.Untouched), 1e-11);
                    }

                    for (int threads = 2; threads <= 3; threads++)
                    {
                        Result again = Result.Of(table, steps, depths, reports, threads);
                        again.Means.ShouldBe(result.Means);
                        again.Shares.ShouldBe(result.Shares);
                        again.Reporting.ShouldBe(result.Reporting);
                    }
                },
                iter: 500
            );

    /// <summary>A step's bits do not depend on whether others near it have gaps. <i>common practice, no source</i></summary>
    [Fact]
    public void A_full_step_beside_one_with_gaps_has_the_same_bits_as_alone()
    {
        var random = new Random(3);
        var table = new FixedWeights(30, [0, 30], [.. Enumerable.Range(0, 30)], Weights(random, 30));
        double[] depths = [.. Enumerable.Range(0, 60).Select(_ => random.NextDouble())];
        bool[] reports = [.. Enumerable.Range(0, 60).Select(i => i != 50)];
        Result both = Result.Of(table, 2, depths, reports, 1);
        Result alone = Result.Of(table, 1, depths[..30], reports[..30], 1);
        both.Means[0].ShouldBe(alone.Means[0]);
        both.Shares[0].ShouldBe(1);
        both.Reporting.ShouldBe([30, 29]);
    }

    [Fact]
    public void Arguments_that_do_not_fit_are_refused()
    {
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [0, 1], [2], [1])).ParamName.ShouldBe("weights");
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [0, 1], [-1], [1])).ParamName.ShouldBe("weights");
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [0, 1], [1], [0])).ParamName.ShouldBe("weights");
        Should
            .Throw<ArgumentException>(() => new FixedWeights(2, [0, 1], [1], [double.NaN]))
            .ParamName.ShouldBe("weights");
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [0, 1], [1], [1, 1])).ParamName.ShouldBe("weights");
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [0, 2], [1], [1])).ParamName.ShouldBe("starts");
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [0, 0, 1], [1], [1])).ParamName.ShouldBe("starts");
        Should.Throw<ArgumentException>(() => new FixedWeights(2, [], [], [])).ParamName.ShouldBe("starts");
        var table = new FixedWeights(2, [0, 1], [1], [1]);
        Refused(() => table.Means(1, [1], [true, true], [0], [0], [0], 1), "depths");
        Refused(() => table.Means(1, [1, 1], [true], [0], [0], [0], 1), "reports");
        Refused(() => table.Means(1, [1, 1], [true, true], [], [0], [0], 1), "means");
        Refused(() => table.Means(1, [1, 1], [true, true], [0], [], [0], 1), "reporting");
        Refused(() => table.Means(1, [1, 1], [true, true], [0], [0], [], 1), "shares");
        Refused(() => table.Means(-1, [], [], [], [], [], 1), "steps");
        Refused(() => table.Means(0, [], [], [], [], [], 0), "threads");
    }

    private static void Refused(Action action, string name) =>
        Should.Throw<ArgumentException>(action).ParamName.ShouldBe(name);

    private static int[] Owners(Random random, int sites)
    {
        int[] all = [.. Enumerable.Range(0, sites)];
        random.Shuffle(all);
        return all[..(1 + random.Next(sites))];
    }

    private static double[] Weights(Random random, int count)
    {
        double[] raw = [.. Enumerable.Range(0, count).Select(_ => 0.1 + random.NextDouble())];
        return [.. raw.Select(weight => weight / raw.Sum())];
    }

    private static (decimal? Mean, int Count, decimal Share) Plain(
        int[] owners,
        double[] weights,
        double[] depths,
        bool[] reports
    )
    {
        (int Site, decimal Weight)[] live =
        [
            .. owners.Zip(weights, (site, weight) => (site, (decimal)weight)).Where(row => reports[row.site]),
        ];
        decimal share = live.Sum(row => row.Weight);
        decimal sum = live.Sum(row => row.Weight * (decimal)depths[row.Site]);
        return (live.Length == 0 ? null : sum / share, live.Length, live.Length == owners.Length ? 1 : share);
    }

    private static double[] Numbers(JsonElement array) => [.. array.EnumerateArray().Select(item => item.GetDouble())];

    private sealed record Result(double[] Means, int[] Reporting, double[] Shares)
    {
        public static double Untouched => -7;

        public static Result Of(FixedWeights table, int steps, double[] depths, bool[] reports, int threads)
        {
            var result = new Result(
                new double[steps * table.Count],
                new int[steps * table.Count],
                new double[steps * table.Count]
            );
            Array.Fill(result.Means, Untouched);
            table.Means(steps, depths, reports, result.Means, result.Reporting, result.Shares, threads);
            return result;
        }
    }
}
