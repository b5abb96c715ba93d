using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Numerics.Triangulation;

/// <summary>
/// Distinct sites in an order that depends on their places alone: along the Hilbert curve, and by x, then y, where the
/// curve does not tell them apart. Everything computed from it is the same whatever order the caller gave them in. A
/// site's number in this order is called its rank.
/// </summary>
internal sealed class OrderedSites
{
    private readonly ulong[] keys;
    private readonly HilbertCurve curve;

    private OrderedSites(double[] x, double[] y, int[] callerIndex, ulong[] keys, HilbertCurve curve)
    {
        X = x;
        Y = y;
        CallerIndex = callerIndex;
        this.keys = keys;
        this.curve = curve;
    }

    /// <summary>Easting by rank, in metres, on the lattice.</summary>
    public double[] X { get; }

    /// <summary>Northing by rank, in metres, on the lattice.</summary>
    public double[] Y { get; }

    /// <summary>The caller's index by rank.</summary>
    public int[] CallerIndex { get; }

    public int Count => X.Length;

    /// <exception cref="ArgumentException">No sites, lengths that differ, or a coordinate off the lattice.</exception>
    /// <exception cref="CoincidentSitesException">Sites that share a place.</exception>
    public static OrderedSites Of(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        Check(x, y);
        var hilbert = new HilbertCurve(x, y);
        var places = new ulong[x.Length];
        for (int i = 0; i < places.Length; i++)
        {
            places[i] = hilbert.KeyOf(x[i], y[i]);
        }

        int[] order = RadixSort.Sort(places, HilbertCurve.KeyBits);
        SortWithinKeys(places, order, x, y);
        var sites = new OrderedSites(Take(x, order), Take(y, order), order, places, hilbert);
        sites.RefuseCoincident();
        return sites;
    }

    /// <summary>Whether site <paramref name="a"/> comes after site <paramref name="b"/> by x, then y.</summary>
    public bool IsAfter(int a, int b) => X[a] > X[b] || (X[a] == X[b] && Y[a] > Y[b]);

    /// <summary>The rank of a site that is near to a place in most cases: the next one along the curve.</summary>
    public int NearOnCurve(double x, double y)
    {
        int found = Array.BinarySearch(keys, curve.KeyOf(x, y));
        return Math.Min(found < 0 ? ~found : found, Count - 1);
    }

    private static void Check(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        if (x.Length != y.Length || x.Length == 0)
        {
            throw new ArgumentException(
                $"Sites need as many eastings as northings, and one at least; given {x.Length} and {y.Length}.",
                nameof(x)
            );
        }

        for (int i = 0; i < x.Length; i++)
        {
            if (!Lattice.Holds(x[i]) || !Lattice.Holds(y[i]))
            {
                throw new ArgumentException(
                    FormattableString.Invariant(
                        $"Site {i} at ({x[i]:R}, {y[i]:R}) is not on the lattice: snap it first."
                    ),
                    nameof(x)
                );
            }
        }
    }

    private static double[] Take(ReadOnlySpan<double> values, int[] order)
    {
        var taken = new double[order.Length];
        for (int i = 0; i < order.Length; i++)
        {
            // Adding zero: a negative zero given by the caller becomes a plain one.
            taken[i] = values[order[i]] + 0.0;
        }

        return taken;
    }

    private static void SortWithinKeys(ulong[] keys, int[] order, ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        for (int start = 0; start < keys.Length; )
        {
            int end = start + 1;
            while (end < keys.Length && keys[end] == keys[start])
            {
                end++;
            }

            if (end - start > 1)
            {
                SortRun(order.AsSpan(start, end - start), x, y);
            }

            start = end;
        }
    }

    private static void SortRun(Span<int> run, ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        var places = new (double X, double Y, int Index)[run.Length];
        for (int i = 0; i < run.Length; i++)
        {
            places[i] = (x[run[i]], y[run[i]], run[i]);
        }

        Array.Sort(places);
        for (int i = 0; i < run.Length; i++)
        {
            run[i] = places[i].Index;
        }
    }

    /// <summary>Sites of one place have one key and stand side by side, the caller's indices ascending.</summary>
    private void RefuseCoincident()
    {
        var groups = new List<int[]>();
        for (int start = 0; start < Count; )
        {
            int end = start + 1;
            while (end < Count && X[end] == X[start] && Y[end] == Y[start])
            {
                end++;
            }

            if (end - start > 1)
            {
                groups.Add(CallerIndex[start..end]);
            }

            start = end;
        }

        if (groups.Count > 0)
        {
            groups.Sort((a, b) => a[0].CompareTo(b[0]));
            throw new CoincidentSitesException(groups);
        }
    }
}
