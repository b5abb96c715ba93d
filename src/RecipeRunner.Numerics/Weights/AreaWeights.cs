using RecipeRunner.Numerics.Cells;

namespace RecipeRunner.Numerics.Weights;

/// <summary>
/// For each of many polygons the sites that own part of it, the area of that part and its share of the whole. The same
/// bits for any order of the sites and any number of threads.
/// </summary>
/// <remarks>
/// The weights of a polygon sum to 1 within 1e-12, its areas to its own within 1e-9 relative, or it is refused. A piece no
/// larger than 2⁻⁴⁹ of the magnitudes it was added up from, or 1e-15 of the polygon, cannot be told from rounding and is not
/// reported.
/// </remarks>
public sealed class AreaWeights
{
    private readonly int[] starts;
    private readonly int[] sites;
    private readonly double[] areas;
    private readonly double[] weights;
    private readonly double[] polygonAreas;

    private AreaWeights(WeightRows[] chunks, int polygons)
    {
        int total = chunks.Sum(chunk => chunk.Sites.Count);
        starts = new int[polygons + 1];
        sites = new int[total];
        areas = new double[total];
        weights = new double[total];
        polygonAreas = new double[polygons];
        int polygon = 0;
        int start = 0;
        foreach (WeightRows chunk in chunks)
        {
            chunk.Sites.CopyTo(sites, start);
            chunk.Areas.CopyTo(areas, start);
            chunk.Weights.CopyTo(weights, start);
            chunk.PolygonAreas.CopyTo(polygonAreas, polygon);
            foreach (int end in chunk.Ends)
            {
                starts[++polygon] = start + end;
            }

            start += chunk.Sites.Count;
        }
    }

    /// <summary>How many polygons there are.</summary>
    public int Count => polygonAreas.Length;

    /// <summary>The sites that own part of a polygon, ascending.</summary>
    public ReadOnlySpan<int> Sites(int polygon) => sites.AsSpan(starts[polygon]..starts[polygon + 1]);

    /// <summary>The area in square metres of each of those parts, positive.</summary>
    public ReadOnlySpan<double> Areas(int polygon) => areas.AsSpan(starts[polygon]..starts[polygon + 1]);

    /// <summary>The share of each of those parts, positive; they sum to 1.</summary>
    public ReadOnlySpan<double> Weights(int polygon) => weights.AsSpan(starts[polygon]..starts[polygon + 1]);

    /// <summary>The area of a polygon in square metres, holes taken off, from its outline alone.</summary>
    public double PolygonArea(int polygon) => polygonAreas[polygon];

    /// <summary>Weighs polygons by cells.</summary>
    /// <param name="cells">The cells.</param>
    /// <param name="polygons">The polygons.</param>
    /// <param name="threads">How many threads may work at the same time, 1 or more.</param>
    /// <exception cref="PolygonsRefusedException">Polygons that cannot be weighed; all of them are named.</exception>
    public static AreaWeights Of(ThiessenCells cells, PolygonBatch polygons, int threads)
    {
        ArgumentNullException.ThrowIfNull(cells);
        ArgumentNullException.ThrowIfNull(polygons);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads, 1);
        const int ChunkSize = 64;
        var chunks = new WeightRows[(polygons.Count + ChunkSize - 1) / ChunkSize];
        int next = -1;
        int workers = Math.Min(threads, chunks.Length);
        Parallel.For(
            0,
            workers,
            new ParallelOptions { MaxDegreeOfParallelism = threads },
            _ =>
            {
                var weigher = new PolygonWeigher(cells.Graph, polygons);
                for (
                    int chunk = Interlocked.Increment(ref next);
                    chunk < chunks.Length;
                    chunk = Interlocked.Increment(ref next)
                )
                {
                    int first = chunk * ChunkSize;
                    chunks[chunk] = weigher.Weigh(first, Math.Min(first + ChunkSize, polygons.Count));
                }
            }
        );
        List<PolygonRefusal> refusals = [.. chunks.SelectMany(chunk => chunk.Refusals)];
        return refusals.Count == 0
            ? new AreaWeights(chunks, polygons.Count)
            : throw new PolygonsRefusedException(refusals);
    }
}
