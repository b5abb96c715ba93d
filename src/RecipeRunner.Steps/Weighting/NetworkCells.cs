using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Brings gauge networks to the numbers room and back.</summary>
internal static class NetworkCells
{
    /// <summary>The triangulation of a network.</summary>
    /// <exception cref="RefusedException">Gauges stand in one place; all of them are named.</exception>
    public static DelaunayTriangulation Triangulate(GaugeNetwork network)
    {
        RequireDistinct(network);
        return DelaunayTriangulation.Of(
            [.. network.Gauges.Select(gauge => gauge.Place.X)],
            [.. network.Gauges.Select(gauge => gauge.Place.Y)]
        );
    }

    /// <summary>The cells of a network.</summary>
    /// <exception cref="RefusedException">Gauges stand in one place; all of them are named.</exception>
    public static ThiessenCells Of(GaugeNetwork network) => ThiessenCells.Of(Triangulate(network));

    /// <summary>The outline of one cell cut to a frame; empty where it misses the frame.</summary>
    public static Region Outline(ThiessenCells cells, int gauge, Frame frame)
    {
        var outline = cells.Outline(gauge, frame);
        return outline.X.Length < 3
            ? Region.Empty
            : Region.OfShell(
                Enumerable.Range(0, outline.X.Length).Select(i => new Location(outline.X[i], outline.Y[i]))
            );
    }

    private static void RequireDistinct(GaugeNetwork network)
    {
        var problems = new Problems();
        foreach (var together in network.Gauges.GroupBy(gauge => gauge.Place).Where(group => group.Skip(1).Any()))
        {
            var ids = together.Select(gauge => gauge.Id).ToImmutableArray();
            problems.Add(
                "RR0402",
                new Place(network.Source, Item: $"gauges {string.Join(" and ", ids)}"),
                FormattableString.Invariant(
                    $"They stand in one place ({together.Key.X:0.###} E, {together.Key.Y:0.###} N), so no line parts their cells."
                ),
                $"Correct a coordinate, or leave one out:   .Without(\"{ids[^1]}\")"
            );
        }

        problems.ThrowIfAny();
    }
}
