using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Watches how far edges stray: vertices are projected, edges stay straight in the grid, and the true image of a long edge
/// along a parallel is curved. More than a metre is a caution.
/// </summary>
internal sealed class EdgeWatch(string file)
{
    /// <summary>How many metres an edge may stray without a word.</summary>
    public const double AllowedMetres = 1;

    private int straying;
    private double most;
    private string mostItem = "";

    /// <summary>Takes in a place on the true image of an edge.</summary>
    /// <param name="item">What the edge belongs to, such as <c>basin B-3</c>.</param>
    /// <param name="start">Where the straight edge starts in the grid.</param>
    /// <param name="end">Where it ends.</param>
    /// <param name="image">The places of its true image, in the grid.</param>
    public void See(string item, Location start, Location end, ReadOnlySpan<Location> image)
    {
        var worst = 0.0;
        foreach (var place in image)
        {
            worst = Math.Max(worst, DistanceToSegment(place, start, end));
        }

        straying += worst > AllowedMetres ? 1 : 0;
        (most, mostItem) = worst > most ? (worst, item) : (most, mostItem);
    }

    /// <summary>Says how many edges stray, and which the most.</summary>
    public void Report(StepContext context)
    {
        if (straying > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0340",
                    new Place(file, Item: mostItem),
                    FormattableString.Invariant(
                        $"Straight edges in the grid stray from the borders as they were drawn: {straying} by more than {AllowedMetres} m, the furthest by {most:0.#} m on {mostItem}."
                    ),
                    "Put vertices on long edges before projecting: .To(grid, densify: 1000) leaves no edge longer than 1000 m."
                )
            );
        }
    }

    private static double DistanceToSegment(Location place, Location start, Location end)
    {
        var (dx, dy) = (end.X - start.X, end.Y - start.Y);
        var length = (dx * dx) + (dy * dy);
        var share =
            length == 0 ? 0 : Math.Clamp((((place.X - start.X) * dx) + ((place.Y - start.Y) * dy)) / length, 0, 1);
        return place.DistanceTo(new Location(start.X + (share * dx), start.Y + (share * dy)));
    }
}
