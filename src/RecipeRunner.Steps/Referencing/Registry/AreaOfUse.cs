using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>The rectangle of longitudes and latitudes for which a system or an operation is meant, borders included.</summary>
/// <param name="West">Degrees from Greenwich, -180 to 180.</param>
/// <param name="South">Degrees, -90 to 90.</param>
/// <param name="East">Degrees from Greenwich; less than <paramref name="West"/> where the rectangle crosses 180.</param>
/// <param name="North">Degrees, at least <paramref name="South"/>.</param>
internal readonly record struct AreaOfUse(double West, double South, double East, double North)
{
    /// <summary>East to west extent in degrees, 0 to 360.</summary>
    public double Width => East >= West ? East - West : East - West + 360;

    /// <summary>The middle of the rectangle.</summary>
    public Location Centre => new(Degrees.Wrap(West + (Width / 2), 0), (South + North) / 2);

    /// <summary>How far a place lies outside, in degrees of longitude or latitude, whichever is more; 0 where inside.</summary>
    public double Outside(Location place)
    {
        var east = Degrees.Wrap(place.X - (West + (Width / 2)), 0);
        var sideways = Math.Max(0, Math.Abs(east) - (Width / 2));
        var upright = Math.Max(0, Math.Max(South - place.Y, place.Y - North));
        return Math.Max(sideways, upright);
    }

    /// <summary>True where the two rectangles share a place.</summary>
    public bool Meets(AreaOfUse other)
    {
        var apart = Math.Abs(Degrees.Wrap(Centre.X - other.Centre.X, 0));
        return apart <= (Width + other.Width) / 2 && South <= other.North && other.South <= North;
    }

    /// <inheritdoc/>
    public override string ToString() =>
        FormattableString.Invariant($"longitude {West} to {East}, latitude {South} to {North}");
}
