namespace RecipeRunner.Model.Space;

/// <summary>An axis-parallel rectangle, borders included. Empty where nothing has been taken in.</summary>
/// <param name="West">The lowest X.</param>
/// <param name="South">The lowest Y.</param>
/// <param name="East">The highest X.</param>
/// <param name="North">The highest Y.</param>
public readonly record struct Bounds(double West, double South, double East, double North)
{
    /// <summary>The rectangle that holds nothing.</summary>
    public static Bounds Empty { get; } =
        new(double.PositiveInfinity, double.PositiveInfinity, double.NegativeInfinity, double.NegativeInfinity);

    /// <summary>True where the rectangle holds no place.</summary>
    public bool IsEmpty => West > East;

    /// <summary>East to west extent; 0 where empty.</summary>
    public double Width => IsEmpty ? 0 : East - West;

    /// <summary>North to south extent; 0 where empty.</summary>
    public double Height => IsEmpty ? 0 : North - South;

    /// <summary>The rectangle grown to hold a place.</summary>
    public Bounds With(Location place) =>
        new(Math.Min(West, place.X), Math.Min(South, place.Y), Math.Max(East, place.X), Math.Max(North, place.Y));

    /// <summary>The rectangle grown to hold another.</summary>
    public Bounds With(Bounds other) =>
        new(
            Math.Min(West, other.West),
            Math.Min(South, other.South),
            Math.Max(East, other.East),
            Math.Max(North, other.North)
        );

    /// <summary>The rectangle with a margin on all four sides.</summary>
    /// <param name="margin">In the unit of the coordinates, not negative.</param>
    public Bounds Grow(double margin) =>
        IsEmpty ? this : new(West - margin, South - margin, East + margin, North + margin);

    /// <summary>The smallest rectangle that holds all the places.</summary>
    public static Bounds Of(IEnumerable<Location> places) =>
        places.Aggregate(Empty, (bounds, place) => bounds.With(place));
}
