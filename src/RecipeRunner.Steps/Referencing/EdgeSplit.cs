using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Places along an edge, straight in the system in which the edge was drawn.</summary>
internal static class EdgeSplit
{
    /// <summary>
    /// Writes the places that divide an edge into equal pieces, without its ends. Two neighbours that run along the same edge
    /// in opposite directions get the same places, bit for bit, so that no sliver opens between them.
    /// </summary>
    /// <param name="start">Where the edge starts.</param>
    /// <param name="end">Where it ends.</param>
    /// <param name="isGeographic">True for degrees: an edge then takes the shorter way round the Earth.</param>
    /// <param name="inner">Takes the places, one fewer than pieces.</param>
    public static void Divide(Location start, Location end, bool isGeographic, Span<Location> inner)
    {
        if (isGeographic)
        {
            end = new Location(Degrees.Wrap(end.X, start.X), end.Y);
        }

        var forward = start.X < end.X || (start.X == end.X && start.Y <= end.Y);
        var (low, high) = forward ? (start, end) : (end, start);
        var pieces = inner.Length + 1;
        for (var i = 1; i < pieces; i++)
        {
            var share = (double)i / pieces;
            var place = new Location(low.X + ((high.X - low.X) * share), low.Y + ((high.Y - low.Y) * share));
            inner[forward ? i - 1 : pieces - 1 - i] = place;
        }
    }
}
