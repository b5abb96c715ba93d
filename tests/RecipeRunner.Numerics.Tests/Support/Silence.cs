namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>Which sites of a network report.</summary>
internal static class Silence
{
    public static string[] Kinds { get; } =
    ["none silent", "one silent", "some silent", "half silent", "most silent", "all but one silent", "one side silent"];

    /// <summary>A value a site, true where it reports; one at least does.</summary>
    public static bool[] For(Network network, string kind, int seed)
    {
        var random = new Random(seed);
        int pick = random.Next(network.Count);
        double middle = (network.X.Min() + network.X.Max()) / 2;
        bool[] reports =
        [
            .. Enumerable
                .Range(0, network.Count)
                .Select(site =>
                    kind switch
                    {
                        "none silent" => true,
                        "one silent" => site != pick,
                        "some silent" => random.NextDouble() > 0.1,
                        "half silent" => random.NextDouble() > 0.5,
                        "most silent" => random.NextDouble() > 0.9,
                        "all but one silent" => site == pick,
                        "one side silent" => network.X[site] > middle,
                        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "no such kind"),
                    }
                ),
        ];
        reports[pick] |= !reports.Contains(true);
        return reports;
    }
}
