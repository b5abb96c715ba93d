using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Watches whether the things of a layer lie where a system is meant to be used. Outside its area of use: a caution.
/// Outside the area of a projection by more than five degrees of longitude or latitude: refused, because there a projection
/// can give plausible garbage. Five degrees take in the neighbouring zones that studies commonly share a grid with; measured
/// there against PROJ 9.1.1 over all codes, results are right to a centimetre but for 0.7 m at worst in transverse Mercator
/// (EPSG:9377) and 2 m in Cassini-Soldner (EPSG:28193).
/// </summary>
internal sealed class AreaWatch(KnownSystem system, string file)
{
    /// <summary>How many degrees outside its area a projection is still used.</summary>
    public const double FarthestDegrees = 5;

    private readonly Problems far = new();
    private int outside;
    private int seen;
    private double most;
    private string mostItem = "";

    /// <summary>Takes in a thing of the layer.</summary>
    /// <param name="item">As people would name it, such as <c>basin B-3</c>.</param>
    /// <param name="degrees">Its places: longitude from Greenwich and latitude.</param>
    public void See(string item, ReadOnlySpan<Location> degrees)
    {
        seen++;
        var worst = 0.0;
        var at = default(Location);
        foreach (var place in degrees)
        {
            var by = system.Area.Outside(place);
            (worst, at) = by > worst ? (by, place) : (worst, at);
        }

        outside += worst > 0 ? 1 : 0;
        (most, mostItem) = worst > most ? (worst, item) : (most, mostItem);
        if (worst > FarthestDegrees && system.Projection is not null)
        {
            far.Add(
                "RR0332",
                new Place(file, Item: item),
                FormattableString.Invariant(
                    $"{item} reaches {at.X:0.##} E, {at.Y:0.##} N, {worst:0.#} degrees outside the area of {system.Facts.Label} ({system.Area})."
                ),
                "Check the coordinates, their order and their reference system, or choose a grid made for the place."
            );
        }
    }

    /// <summary>Refuses what lies far outside.</summary>
    /// <exception cref="RefusedException">RR0332, once for each thing.</exception>
    public void ThrowIfFar() => far.ThrowIfAny();

    /// <summary>Says how many things lie outside, and which the furthest.</summary>
    public void Report(StepContext context)
    {
        if (outside > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0331",
                    new Place(file),
                    FormattableString.Invariant(
                        $"{outside} of {seen} lie outside the area for which {system.Facts.Label} is meant ({system.Area}); the furthest is {mostItem}, {most:0.##} degrees outside."
                    ),
                    "Nothing needs doing where the places are right and the scale stated in the journal suits."
                )
            );
        }
    }
}
