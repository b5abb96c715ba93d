using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>How far lengths and areas in a grid are from those on the ellipsoid, over an extent.</summary>
/// <param name="LeastLength">The least scale of lengths at any place in any direction.</param>
/// <param name="MostLength">The greatest.</param>
/// <param name="LeastArea">The least scale of areas.</param>
/// <param name="MostArea">The greatest.</param>
internal readonly record struct ScaleDistortion(
    double LeastLength,
    double MostLength,
    double LeastArea,
    double MostArea
)
{
    /// <summary>
    /// Areas further off than this are a caution: official basin areas are commonly given to a percent, and a basin's area
    /// would no longer agree with them. Common practice, no source.
    /// </summary>
    public const double WorstArea = 0.01;

    private const int PlacesAcross = 9;
    private const double HighestLatitude = 89.9;

    /// <summary>The largest share by which a length is off.</summary>
    public double Length => Math.Max(MostLength - 1, 1 - LeastLength);

    /// <summary>The largest share by which an area is off.</summary>
    public double Area => Math.Max(MostArea - 1, 1 - LeastArea);

    /// <summary>The distortion over the extent of some places, from a lattice of nine by nine over it.</summary>
    /// <param name="grid">A projected system.</param>
    /// <param name="degrees">At least one place: longitude from Greenwich and latitude.</param>
    public static ScaleDistortion Over(KnownSystem grid, IEnumerable<Location> degrees)
    {
        var middle = grid.Definition.Form!.Longitude;
        var extent = Bounds.Of(degrees.Select(place => new Location(Degrees.Wrap(place.X, middle), place.Y)));
        var scales = (
            from i in Enumerable.Range(0, PlacesAcross)
            from j in Enumerable.Range(0, PlacesAcross)
            let place = new Location(
                extent.West + (extent.Width * i / (PlacesAcross - 1)),
                Math.Clamp(extent.South + (extent.Height * j / (PlacesAcross - 1)), -HighestLatitude, HighestLatitude)
            )
            select LocalScale.At(grid.Projection!, grid.Definition.Ellipsoid, place)
        ).ToArray();
        return new ScaleDistortion(
            scales.Min(scale => scale.Least),
            scales.Max(scale => scale.Most),
            scales.Min(scale => Math.Abs(scale.Area)),
            scales.Max(scale => Math.Abs(scale.Area))
        );
    }

    /// <summary>States the distortion in the journal, and finds fault where areas are off by more than a percent.</summary>
    /// <param name="context">Where to say it.</param>
    /// <param name="grid">The grid, for the message.</param>
    /// <param name="file">The source of the layer, for the message.</param>
    /// <param name="over">What it was computed over, such as <c>the basins</c>.</param>
    public void Report(StepContext context, ReferenceSystem grid, string file, string over)
    {
        context.State("scale", $"lengths true within {Percent(Length)} over {over}");
        if (Area > WorstArea)
        {
            context.Find(
                Finding.Caution(
                    "RR0341",
                    new Place(file),
                    $"Areas in {grid.Label} are off by up to {Percent(Area)} over {over}, lengths by up to {Percent(Length)}. "
                        + "Shares of a basin change less, areas in km² by that much.",
                    "Choose a grid made for the area, or an equal-area one."
                )
            );
        }
    }

    /// <summary>Two significant digits, rounded up so that the statement holds.</summary>
    private static string Percent(double share)
    {
        var percent = Math.Max(share * 100, 1e-4);
        var unit = Math.Pow(10, Math.Floor(Math.Log10(percent)) - 1);
        return FormattableString.Invariant($"{Math.Ceiling((percent / unit) - 1e-6) * unit:0.######} %");
    }
}
