using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Numerics.Weights;

/// <summary>
/// Many polygons, such as basins, as flat arrays. A polygon is one or more rings; outer rings run counter-clockwise,
/// holes clockwise, in any order, islands and holes in islands included; a ring's first point is not repeated at its end.
/// Rings of one polygon neither cross nor overlap: that is the caller's duty, as only the ends that meet the eye
/// (a polygon or piece with no or negative area) are noticed when weights are computed.
/// </summary>
public sealed class PolygonBatch
{
    private readonly double[] x;
    private readonly double[] y;
    private readonly int[] ringStarts;
    private readonly int[] polygonStarts;

    /// <summary>Takes the arrays as they are, without a copy; they may not change afterwards.</summary>
    /// <param name="x">Eastings of all points, in metres.</param>
    /// <param name="y">Northings, as many.</param>
    /// <param name="ringStarts">Index of the first point of each ring, then the number of points; ascending from 0.</param>
    /// <param name="polygonStarts">Index of the first ring of each polygon, then the number of rings; ascending from 0.</param>
    /// <exception cref="ArgumentException">
    /// Lengths or starts that do not fit, a polygon without rings, a ring of fewer than three points, or a coordinate that
    /// is not a number within the lattice's reach.
    /// </exception>
    public PolygonBatch(double[] x, double[] y, int[] ringStarts, int[] polygonStarts)
    {
        ArgumentNullException.ThrowIfNull(x);
        ArgumentNullException.ThrowIfNull(y);
        ArgumentNullException.ThrowIfNull(ringStarts);
        ArgumentNullException.ThrowIfNull(polygonStarts);
        if (x.Length != y.Length)
        {
            throw new ArgumentException(
                FormattableString.Invariant($"Given {x.Length} eastings and {y.Length} northings."),
                nameof(y)
            );
        }

        CheckStarts(ringStarts, x.Length, 3, nameof(ringStarts));
        CheckStarts(polygonStarts, ringStarts.Length - 1, 1, nameof(polygonStarts));
        CheckCoordinates(x, nameof(x));
        CheckCoordinates(y, nameof(y));
        this.x = x;
        this.y = y;
        this.ringStarts = ringStarts;
        this.polygonStarts = polygonStarts;
    }

    /// <summary>How many polygons there are.</summary>
    public int Count => polygonStarts.Length - 1;

    /// <summary>Index of a polygon's first ring.</summary>
    internal int FirstRing(int polygon) => polygonStarts[polygon];

    /// <summary>Index of the ring after a polygon's last.</summary>
    internal int EndRing(int polygon) => polygonStarts[polygon + 1];

    internal ReadOnlySpan<double> RingX(int ring) => x.AsSpan(ringStarts[ring]..ringStarts[ring + 1]);

    internal ReadOnlySpan<double> RingY(int ring) => y.AsSpan(ringStarts[ring]..ringStarts[ring + 1]);

    private static void CheckStarts(int[] starts, int end, int least, string name)
    {
        if (starts.Length == 0 || starts[0] != 0 || starts[^1] != end)
        {
            throw new ArgumentException(FormattableString.Invariant($"Starts must run from 0 to {end}."), name);
        }

        for (int i = 1; i < starts.Length; i++)
        {
            if (starts[i] - starts[i - 1] < least)
            {
                throw new ArgumentException(
                    FormattableString.Invariant($"Item {i - 1} has fewer than {least} parts."),
                    name
                );
            }
        }
    }

    private static void CheckCoordinates(double[] values, string name)
    {
        for (int i = 0; i < values.Length; i++)
        {
            if (!(Math.Abs(values[i]) <= Lattice.ReachMetres))
            {
                throw new ArgumentException(
                    FormattableString.Invariant(
                        $"Coordinate {i} is {values[i]:R}; it must be a number of at most {Lattice.ReachMetres:F0} m."
                    ),
                    name
                );
            }
        }
    }
}
