namespace RecipeRunner.Numerics.Triangulation;

/// <summary>
/// The order in which sites enter a triangulation: rounds that double in size, each round along the Hilbert curve, the
/// round of a site drawn by a fixed hash of its rank.
/// </summary>
/// <remarks>
/// N. Amenta, S. Choi, G. Rote, "Incremental constructions con BRIO", Symposium on Computational Geometry 2003: the
/// expected cost is that of a random order, O(n log n), and the walk from one site to the next is short. The hash is
/// the finaliser of G. Steele, D. Lea, C. Flood, "Fast splittable pseudorandom number generators", OOPSLA 2014.
/// </remarks>
internal static class InsertionOrder
{
    private const int SmallestRound = 64;

    /// <summary>All ranks below <paramref name="count"/>, first round first.</summary>
    public static int[] Of(int count)
    {
        int rounds = 1;
        while (count >> rounds >= SmallestRound)
        {
            rounds++;
        }

        var next = new int[rounds];
        for (int rank = 0; rank < count; rank++)
        {
            next[RoundOf(rank, rounds)]++;
        }

        int sum = 0;
        for (int round = 0; round < rounds; round++)
        {
            (next[round], sum) = (sum, sum + next[round]);
        }

        var order = new int[count];
        for (int rank = 0; rank < count; rank++)
        {
            order[next[RoundOf(rank, rounds)]++] = rank;
        }

        return order;
    }

    /// <summary>The last round takes one half of the sites, the one before a quarter, and so on.</summary>
    private static int RoundOf(int rank, int rounds) =>
        Math.Max(0, rounds - 1 - (int)ulong.TrailingZeroCount(Mix((ulong)rank)));

    private static ulong Mix(ulong value)
    {
        value += 0x9E3779B97F4A7C15UL;
        value = (value ^ (value >> 30)) * 0xBF58476D1CE4E5B9UL;
        value = (value ^ (value >> 27)) * 0x94D049BB133111EBUL;
        return value ^ (value >> 31);
    }
}
