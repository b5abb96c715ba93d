using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Projects rings, with vertices put on long edges where wanted, and watches their edges.</summary>
/// <param name="transform">The way to the grid.</param>
/// <param name="densify">The longest edge wanted in the grid, in metres; null for none put in.</param>
/// <param name="edges">Takes in how far edges stray.</param>
internal sealed class RingProjection(GridTransform transform, double? densify, EdgeWatch edges)
{
    private const int PiecesWatched = 4;
    private const int MostPieces = 100_000;

    /// <summary>The ring in the grid: vertices that fell together are one, everything else as it was.</summary>
    /// <param name="source">The vertices of the ring in the source's system.</param>
    /// <param name="degrees">The same as longitudes from Greenwich and latitudes.</param>
    /// <param name="where">The thing that it belongs to, for messages.</param>
    public ImmutableArray<Location> Project(ReadOnlySpan<Location> source, ReadOnlySpan<Location> degrees, Place where)
    {
        var grid = new Location[source.Length];
        transform.FromDegrees(source, degrees, grid, where);
        if (densify is { } longest && !transform.IsIdentity)
        {
            var finer = Densify(source, grid, longest, where);
            source = finer;
            grid = Carry(finer, where);
        }

        KeepTogether(grid);
        Watch(source, grid, where);
        return WithoutRepeats(grid);
    }

    private Location[] Densify(ReadOnlySpan<Location> source, Location[] grid, double longest, Place where)
    {
        var finer = new List<Location>(source.Length * 2);
        for (var i = 0; i < grid.Length; i++)
        {
            var next = (i + 1) % grid.Length;
            finer.Add(source[i]);
            var pieces = Math.Ceiling(grid[i].DistanceTo(grid[next]) / longest);
            if (pieces > MostPieces)
            {
                throw new RefusedException(
                    Finding.Error(
                        "RR0352",
                        where,
                        FormattableString.Invariant(
                            $"An edge would get {pieces:N0} pieces of {longest} m; more than {MostPieces:N0} are not made."
                        ),
                        "Give densify a longer length in metres."
                    )
                );
            }

            var inner = new Location[Math.Max(0, (int)pieces - 1)];
            EdgeSplit.Divide(source[i], source[next], IsGeographic, inner);
            finer.AddRange(inner);
        }

        return [.. finer];
    }

    private void Watch(ReadOnlySpan<Location> source, Location[] grid, Place where)
    {
        if (transform.IsIdentity || transform.Target.Projection is null)
        {
            return;
        }

        const int inner = PiecesWatched - 1;
        var between = new Location[source.Length * inner];
        for (var i = 0; i < source.Length; i++)
        {
            var next = source[(i + 1) % source.Length];
            EdgeSplit.Divide(source[i], next, IsGeographic, between.AsSpan(i * inner, inner));
        }

        var image = Carry(between, where);
        for (var i = 0; i < grid.Length; i++)
        {
            edges.See(where.Item, grid[i], grid[(i + 1) % grid.Length], image.AsSpan(i * inner, inner));
        }
    }

    private Location[] Carry(Location[] places, Place where)
    {
        var degrees = new Location[places.Length];
        var results = new Location[places.Length];
        transform.ToDegrees(places, degrees, where);
        transform.FromDegrees(places, degrees, results, where);
        return results;
    }

    /// <summary>Where the target is in degrees, lets a ring go on past 180 instead of jumping to the other side of the Earth.</summary>
    private void KeepTogether(Location[] ring)
    {
        if (transform.Target.Projection is not null || transform.IsIdentity)
        {
            return;
        }

        for (var i = 1; i < ring.Length; i++)
        {
            ring[i] = ring[i] with { X = Degrees.Wrap(ring[i].X, ring[i - 1].X) };
        }
    }

    private bool IsGeographic => transform.From.Kind == ReferenceSystemKind.Geographic;

    private static ImmutableArray<Location> WithoutRepeats(Location[] ring)
    {
        var kept = ImmutableArray.CreateBuilder<Location>(ring.Length);
        foreach (var vertex in ring)
        {
            if (kept.Count == 0 || kept[^1] != vertex)
            {
                kept.Add(vertex);
            }
        }

        while (kept.Count > 1 && kept[0] == kept[^1])
        {
            kept.RemoveAt(kept.Count - 1);
        }

        return kept.ToImmutable();
    }
}
