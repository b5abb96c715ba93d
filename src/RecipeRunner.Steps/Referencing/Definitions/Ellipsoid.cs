namespace RecipeRunner.Steps.Referencing;

/// <summary>The figure on which longitudes and latitudes lie.</summary>
/// <param name="Name">As the definition writes it.</param>
/// <param name="SemiMajorMetres">Metres from the centre to the equator.</param>
/// <param name="InverseFlattening">About 293 to 301; 0 for a sphere.</param>
internal sealed record Ellipsoid(string Name, double SemiMajorMetres, double InverseFlattening)
{
    /// <summary>True for a sphere.</summary>
    public bool IsSphere => InverseFlattening == 0;

    /// <summary>Metres from the centre to a pole.</summary>
    public double SemiMinorMetres => IsSphere ? SemiMajorMetres : SemiMajorMetres * (1 - (1 / InverseFlattening));

    /// <summary>The first eccentricity, squared.</summary>
    public double EccentricitySquared
    {
        get
        {
            var flattening = IsSphere ? 0 : 1 / InverseFlattening;
            return flattening * (2 - flattening);
        }
    }

    /// <summary>Metres of a degree along the parallel and along the meridian at a latitude.</summary>
    public (double East, double North) MetresPerDegree(double latitude)
    {
        var sine = Math.Sin(Degrees.ToRadians(latitude));
        var curve = 1 - (EccentricitySquared * sine * sine);
        var acrossMeridian = SemiMajorMetres / Math.Sqrt(curve);
        var alongMeridian = acrossMeridian * (1 - EccentricitySquared) / curve;
        var degree = Math.PI / 180;
        return (acrossMeridian * Math.Cos(Degrees.ToRadians(latitude)) * degree, alongMeridian * degree);
    }

    /// <summary>True where both axes agree to a millimetre, whatever the names.</summary>
    public bool IsLike(Ellipsoid other) =>
        Math.Abs(SemiMajorMetres - other.SemiMajorMetres) < 0.001
        && Math.Abs(SemiMinorMetres - other.SemiMinorMetres) < 0.001;
}
