namespace RecipeRunner.Numerics.Gaps;

/// <summary>Those who own an estate when a set of sites is silent and all others report.</summary>
internal sealed class Heirs
{
    /// <summary>About what an object, its arrays and its place in two tables take.</summary>
    private const int BytesEach = 240;

    private const int BytesPerSilent = 4;
    private const int BytesPerHeir = 16;
    private const int BytesPerNext = 48;

    private Dictionary<(int First, ulong Silent), Heirs>? next;
    private (int First, ulong Silent) latestWay;
    private Heirs? latest;

    /// <param name="silent">Ranks of the silent sites, ascending.</param>
    /// <param name="ranks">Ranks of the heirs, ascending.</param>
    /// <param name="sites">The caller's indices of the heirs.</param>
    /// <param name="shares">The share of the whole polygon that each heir has of the estate.</param>
    public Heirs(int[] silent, int[] ranks, int[] sites, double[] shares)
    {
        Silent = silent;
        Ranks = ranks;
        Sites = sites;
        Shares = shares;
    }

    /// <summary>Ranks of the silent sites, ascending.</summary>
    public int[] Silent { get; }

    /// <summary>Ranks of the heirs, ascending.</summary>
    public int[] Ranks { get; }

    /// <summary>The caller's indices of the heirs.</summary>
    public int[] Sites { get; }

    /// <summary>The share of the whole polygon that each heir has of the estate.</summary>
    public double[] Shares { get; }

    /// <summary>About how many bytes it takes, without ways to others.</summary>
    public long Bytes => BytesEach + (BytesPerSilent * Silent.Length) + (BytesPerHeir * Ranks.Length);

    /// <summary>About how many bytes a way to other heirs takes.</summary>
    public static long BytesOfNext => BytesPerNext;

    /// <summary>
    /// Which heirs are silent: a bit each for up to 64 of them from <paramref name="first"/> on; that are the first 64 in
    /// which anybody is silent. 0 when all report.
    /// </summary>
    public ulong SilentAmong(ReadOnlySpan<bool> reports, out int first)
    {
        int[] sites = Sites;
        for (first = 0; first < sites.Length; first += 64)
        {
            ulong silent = 0;
            int end = Math.Min(sites.Length, first + 64);
            for (int i = first; i < end; i++)
            {
                silent |= reports[sites[i]] ? 0 : 1UL << (i - first);
            }

            if (silent != 0)
            {
                return silent;
            }
        }

        return 0;
    }

    /// <summary>The heirs when these fall silent too, if they were met before; most often it is the same way as last time.</summary>
    public Heirs? Next(int first, ulong silent)
    {
        if (latestWay != (first, silent))
        {
            latestWay = (first, silent);
            latest = next?.GetValueOrDefault(latestWay);
        }

        return latest;
    }

    /// <summary>Keeps the way to other heirs.</summary>
    public void Keep(int first, ulong silent, Heirs heirs)
    {
        (next ??= []).Add((first, silent), heirs);
        (latestWay, latest) = ((first, silent), heirs);
    }

    /// <summary>The silent sites together with those heirs that are silent too, ascending.</summary>
    public int[] SilentWith(int first, ulong silent)
    {
        var all = new List<int>(Silent);
        for (; silent != 0; silent &= silent - 1)
        {
            all.Add(Ranks[first + (int)ulong.TrailingZeroCount(silent)]);
        }

        all.Sort();
        return [.. all];
    }
}
