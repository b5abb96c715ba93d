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
        try
        {
            return DelaunayTriangulation.Of(
                [.. network.Gauges.Select(gauge => gauge.Place.X)],
                [.. network.Gauges.Select(gauge => gauge.Place.Y)]
            );
        }
        catch (CoincidentSitesException refused)
        {
            var problems = new Problems();
            foreach (var group in refused.Groups)
            {
                AddCoincidence(problems, network, [.. group.Select(site => network.Gauges[site])]);
            }

            throw problems.ToRefusal();
        }
    }

    /// <summary>The cells of a network.</summary>
    /// <exception cref="RefusedException">Gauges stand in one place; all of them are named.</exception>
    public static ThiessenCells Of(GaugeNetwork network) => ThiessenCells.Of(Triangulate(network));

    /// <summary>The outline of one cell cut to a frame; empty where it misses the frame.</summary>
    public static Region Outline(ThiessenCells cells, int gauge, Frame frame)
    {
        var outline = cells.Outline(gauge, frame);
        return outline.IsEmpty ? Region.Empty : Region.OfShell(outline.X.Zip(outline.Y, (x, y) => new Location(x, y)));
    }

    private static void AddCoincidence(Problems problems, GaugeNetwork network, Gauge[] together) =>
        problems.Add(
            "RR0402",
            new Place(network.Source, Item: $"gauges {string.Join(" and ", together.Select(gauge => gauge.Id))}"),
            FormattableString.Invariant(
                $"They stand in one place ({together[0].Place.X:0.###} E, {together[0].Place.Y:0.###} N), so no line parts their cells."
            ),
            $"Correct a coordinate, or leave one out:   .Without(\"{together[^1].Id}\")"
        );
}
