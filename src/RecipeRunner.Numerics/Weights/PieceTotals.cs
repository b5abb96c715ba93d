using System.Runtime.InteropServices;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Clipping;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Numerics.Weights;

/// <summary>
/// Adds up the pieces of an area's rings cell by cell, and tells pieces from rounding. The area is a polygon, or a part of
/// one; what is negligible is measured by the whole polygon.
/// </summary>
internal sealed class PieceTotals(CellGraph graph)
{
    /// <summary>Pieces below this part of the magnitudes they were added up from are rounding: 16 roundings.</summary>
    private const double RoundingPart = 1.0 / (1L << 49);

    /// <summary>A negative piece below this part of the polygon changes no weight that anyone is promised.</summary>
    private const double HarmlessPart = 1e-12;

    private readonly PieceAreas cutter = new(graph);
    private readonly int[] place = new int[graph.Sites.Count];
    private readonly List<Piece> pieces = [];

    /// <summary>
    /// Pieces below this part of the polygon are rounding too: along a boundary that runs on a wall, pieces of up to 2e-16 of
    /// it were seen on either side of zero.
    /// </summary>
    public static double LeastPart => 1e-15;

    /// <summary>How far, relative to the polygon, the pieces may be from the whole.</summary>
    public static double AreaTolerance => 1e-9;

    /// <summary>The rank of the site and the area in square metres of each piece, after <see cref="Collect"/>.</summary>
    public List<(int Rank, double Area)> Rows { get; } = [];

    /// <summary>The sum of these areas.</summary>
    public double Sum { get; private set; }

    /// <summary>Begins another area.</summary>
    public void Clear()
    {
        foreach (Piece piece in pieces)
        {
            place[piece.Site] = 0;
        }

        pieces.Clear();
    }

    /// <summary>Adds a ring's pieces, or says why it cannot.</summary>
    public string? Add(Ring ring)
    {
        if (!cutter.Cut(ring))
        {
            return "has a ring without an inside";
        }

        foreach (Piece piece in cutter.Pieces)
        {
            if (place[piece.Site] == 0)
            {
                pieces.Add(new Piece(piece.Site, 0, 0));
                place[piece.Site] = pieces.Count;
            }

            CollectionsMarshal.AsSpan(pieces)[place[piece.Site] - 1].Add(piece.TwiceArea, piece.Magnitude);
        }

        return null;
    }

    /// <summary>Fills <see cref="Rows"/>, or says why it cannot.</summary>
    /// <param name="area">The area that the pieces should add up to.</param>
    /// <param name="whole">The area of the polygon.</param>
    public string? Collect(double area, double whole)
    {
        Rows.Clear();
        var sum = new CompensatedSum();
        foreach (Piece piece in pieces)
        {
            double bound = Math.Max(piece.Magnitude * RoundingPart, LeastPart * whole);
            if (piece.TwiceArea < -Math.Max(bound, HarmlessPart * whole))
            {
                return "has rings that cross, overlap or run the wrong way";
            }

            if (piece.TwiceArea > bound)
            {
                Rows.Add((piece.Site, piece.TwiceArea / 2));
                sum.Add(piece.TwiceArea / 2);
            }
        }

        Sum = sum.Value;
        return Math.Abs(Sum - area) <= AreaTolerance * whole
            ? null
            : "has pieces whose areas do not add up to its own: it is too thin for the coordinates' digits";
    }
}
