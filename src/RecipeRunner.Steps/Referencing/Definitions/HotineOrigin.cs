namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Moves the false origin of Hotine's oblique Mercator from the natural origin, where the initial line meets the aposphere's
/// equator (variant A), to the projection centre (variant B). The projection library computes only the latter rightly.
/// Source: IOGP 373-7-2, methods 9812 and 9815, from memory; verified by the control points of all codes of variant A.
/// </summary>
internal static class HotineOrigin
{
    /// <summary>The same grid with its false origin at the centre.</summary>
    /// <param name="natural">The form with the false origin of variant A.</param>
    /// <param name="ellipsoid">The figure of its datum.</param>
    public static PlaneForm MoveToCentre(PlaneForm natural, Ellipsoid ellipsoid)
    {
        var u = FromNaturalOriginToCentre(natural, ellipsoid);
        var (sine, cosine) = Math.SinCos(Degrees.ToRadians(natural.GridAngle));
        return natural with
        {
            FalseEasting = natural.FalseEasting + (u * sine),
            FalseNorthing = natural.FalseNorthing + (u * cosine),
        };
    }

    /// <summary>Metres along the initial line from the natural origin to the centre.</summary>
    private static double FromNaturalOriginToCentre(PlaneForm form, Ellipsoid ellipsoid)
    {
        var squared = ellipsoid.EccentricitySquared;
        var (sine, cosine) = Math.SinCos(Degrees.ToRadians(form.Latitude));
        var curve = 1 - (squared * sine * sine);
        var b = Math.Sqrt(1 + (squared * Math.Pow(cosine, 4) / (1 - squared)));
        var a = ellipsoid.SemiMajorMetres * b * form.Scale * Math.Sqrt(1 - squared) / curve;
        var d = b * Math.Sqrt(1 - squared) / (cosine * Math.Sqrt(curve));
        var root = Math.Sqrt(Math.Max(0, (d * d) - 1));
        return Math.CopySign(a / b * Math.Atan2(root, Math.Cos(Degrees.ToRadians(form.Azimuth))), form.Latitude);
    }
}
