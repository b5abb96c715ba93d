namespace RecipeRunner.Model.Space;

/// <summary>A place in the plane or on the ellipsoid, always in the order east, north.</summary>
/// <param name="X">Metres east in a projected system (whatever that system's own unit); degrees of longitude in a geographic one.</param>
/// <param name="Y">Metres north in a projected system; degrees of latitude in a geographic one.</param>
public readonly record struct Location(double X, double Y)
{
    /// <summary>The straight distance to another place, in the unit of the coordinates.</summary>
    /// <param name="other">The other place, in the same reference system.</param>
    public double DistanceTo(Location other) =>
        Math.Sqrt(((X - other.X) * (X - other.X)) + ((Y - other.Y) * (Y - other.Y)));
}
