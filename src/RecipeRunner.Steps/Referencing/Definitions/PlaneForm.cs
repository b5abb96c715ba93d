namespace RecipeRunner.Steps.Referencing;

/// <summary>The projection methods that are computed, after every rewrite.</summary>
internal enum PlaneMethod
{
    /// <summary>Transverse Mercator (Gauss-Krüger).</summary>
    TransverseMercator,

    /// <summary>Lambert's conformal cone, through one parallel twice or through two.</summary>
    LambertConic,

    /// <summary>Albers' equal-area cone.</summary>
    Albers,

    /// <summary>Lambert's azimuthal equal-area projection of the ellipsoid.</summary>
    LambertAzimuthal,

    /// <summary>The double stereographic projection.</summary>
    ObliqueStereographic,

    /// <summary>Hotine's oblique Mercator, false origin at the projection centre (variant B).</summary>
    ObliqueMercator,

    /// <summary>Krovak's oblique conformal cone, axes turned to east and north.</summary>
    Krovak,

    /// <summary>Mercator with a scale at the equator (variant A).</summary>
    Mercator,

    /// <summary>Mercator's formula for a sphere, fed with latitudes of the ellipsoid: no true map projection.</summary>
    WebMercator,

    /// <summary>Cassini-Soldner.</summary>
    Cassini,

    /// <summary>American polyconic.</summary>
    Polyconic,
}

/// <summary>The directions of a grid's first and second axis.</summary>
internal enum PlaneAxes
{
    /// <summary>X east, Y north.</summary>
    EastNorth,

    /// <summary>X west, Y south: the plane turned by half a turn.</summary>
    WestSouth,

    /// <summary>X south, Y west: a mirrored plane.</summary>
    SouthWest,
}

/// <summary>
/// A projection in the one form that is computed: degrees from Greenwich, metres, the method with the fewest variants.
/// Two definitions of one grid give equal forms whatever dialect, unit or meridian they are written in. Members that a
/// method does not use are zero, <see cref="Scale"/> is then 1.
/// </summary>
internal sealed record PlaneForm
{
    /// <summary>The method.</summary>
    public required PlaneMethod Method { get; init; }

    /// <summary>Latitude of the natural origin or the projection centre, degrees.</summary>
    public double Latitude { get; init; }

    /// <summary>Longitude of the natural origin or the projection centre, degrees from Greenwich, -180 to 180.</summary>
    public double Longitude { get; init; }

    /// <summary>The southern standard parallel, degrees; Krovak's pseudo standard parallel.</summary>
    public double FirstParallel { get; init; }

    /// <summary>The northern standard parallel, degrees; equal to the first for a cone that touches.</summary>
    public double SecondParallel { get; init; }

    /// <summary>Azimuth of the initial line at the centre, degrees, -180 to 180; Krovak's co-latitude of the cone axis.</summary>
    public double Azimuth { get; init; }

    /// <summary>The angle from the rectified to the skew grid, degrees, -180 to 180.</summary>
    public double GridAngle { get; init; }

    /// <summary>The scale at the natural origin.</summary>
    public double Scale { get; init; } = 1;

    /// <summary>Metres added to the first coordinate before the axes are turned.</summary>
    public double FalseEasting { get; init; }

    /// <summary>Metres added to the second coordinate before the axes are turned.</summary>
    public double FalseNorthing { get; init; }

    /// <summary>The directions of the axes.</summary>
    public PlaneAxes Axes { get; init; }

    /// <summary>True where shapes are true at every place, however small.</summary>
    public bool IsConformal =>
        Method
            is PlaneMethod.TransverseMercator
                or PlaneMethod.LambertConic
                or PlaneMethod.ObliqueStereographic
                or PlaneMethod.ObliqueMercator
                or PlaneMethod.Krovak
                or PlaneMethod.Mercator;

    /// <summary>True where areas are true at every place.</summary>
    public bool IsEqualArea => Method is PlaneMethod.Albers or PlaneMethod.LambertAzimuthal;

    /// <summary>
    /// True where both give the same coordinates to about a millimetre over a thousand kilometres: angles to 1e-8 degrees,
    /// lengths to a millimetre, scales to 1e-10. Files round their parameters, so equality would be too strict.
    /// </summary>
    public bool IsLike(PlaneForm other) =>
        Method == other.Method
        && Axes == other.Axes
        && SameAngle(Latitude, other.Latitude)
        && SameAngle(Longitude, other.Longitude)
        && SameAngle(FirstParallel, other.FirstParallel)
        && SameAngle(SecondParallel, other.SecondParallel)
        && SameAngle(Azimuth, other.Azimuth)
        && SameAngle(GridAngle, other.GridAngle)
        && Math.Abs(Scale - other.Scale) <= 1e-10
        && Math.Abs(FalseEasting - other.FalseEasting) <= 0.001
        && Math.Abs(FalseNorthing - other.FalseNorthing) <= 0.001;

    private static bool SameAngle(double one, double other) => Math.Abs(Degrees.Wrap(one - other, 0)) <= 1e-8;
}
