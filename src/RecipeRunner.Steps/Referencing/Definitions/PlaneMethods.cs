using System.Collections.Frozen;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// The projection methods that are understood, under the names of both dialects of WKT 1 (GDAL's and ESRI's), each with
/// the rewrite into <see cref="PlaneForm"/>. What is not listed here is refused.
/// </summary>
internal static class PlaneMethods
{
    private static readonly FrozenDictionary<string, Func<PlaneParameters, Ellipsoid, PlaneForm>> ByName =
        new Dictionary<string, Func<PlaneParameters, Ellipsoid, PlaneForm>>(StringComparer.OrdinalIgnoreCase)
        {
            ["Transverse_Mercator"] = TransverseMercator,
            ["Gauss_Kruger"] = TransverseMercator,
            ["Transverse_Mercator_South_Orientated"] = SouthOrientated,
            ["Lambert_Conformal_Conic"] = LambertConic,
            ["Lambert_Conformal_Conic_1SP"] = LambertConic,
            ["Lambert_Conformal_Conic_2SP"] = LambertConic,
            ["Albers"] = Albers,
            ["Albers_Conic_Equal_Area"] = Albers,
            ["Lambert_Azimuthal_Equal_Area"] = LambertAzimuthal,
            ["Oblique_Stereographic"] = ObliqueStereographic,
            ["Double_Stereographic"] = ObliqueStereographic,
            ["Hotine_Oblique_Mercator"] = ObliqueMercatorFromNaturalOrigin,
            ["Hotine_Oblique_Mercator_Azimuth_Natural_Origin"] = ObliqueMercatorFromNaturalOrigin,
            ["Rectified_Skew_Orthomorphic_Natural_Origin"] = ObliqueMercatorFromNaturalOrigin,
            ["Hotine_Oblique_Mercator_Azimuth_Center"] = ObliqueMercator,
            ["Rectified_Skew_Orthomorphic_Center"] = ObliqueMercator,
            ["Krovak"] = Krovak,
            ["Mercator"] = Mercator,
            ["Mercator_1SP"] = Mercator,
            ["Mercator_2SP"] = Mercator,
            ["Mercator_Auxiliary_Sphere"] = WebMercator,
            ["Cassini"] = Cassini,
            ["Cassini_Soldner"] = Cassini,
            ["Polyconic"] = Polyconic,
        }.ToFrozenDictionary(StringComparer.OrdinalIgnoreCase);

    /// <summary>True where a method of this name is understood.</summary>
    public static bool Knows(string method) => ByName.ContainsKey(method);

    /// <summary>The form that is computed.</summary>
    /// <param name="method">A name for which <see cref="Knows"/> is true.</param>
    /// <param name="parameters">All its parameters; none may be missing or left over.</param>
    /// <param name="ellipsoid">The figure of its datum.</param>
    public static PlaneForm Rewrite(string method, PlaneParameters parameters, Ellipsoid ellipsoid)
    {
        var form = ByName[method](parameters, ellipsoid);
        parameters.RefuseLeftOver();
        return form;
    }

    /// <summary>Mercator on a sphere, as web maps use it.</summary>
    public static PlaneForm WebMercator(PlaneParameters given, Ellipsoid ellipsoid)
    {
        given.Expect("standard_parallel_1", 0);
        given.Expect("auxiliary_sphere_type", 0);
        given.Expect("scale_factor", 1);
        given.Expect("latitude_of_origin", 0);
        return WithFalseOrigin(
            given,
            new PlaneForm { Method = PlaneMethod.WebMercator, Longitude = given.Longitude("central_meridian") }
        );
    }

    private static PlaneForm TransverseMercator(PlaneParameters given, Ellipsoid ellipsoid) =>
        WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.TransverseMercator,
                Latitude = given.Angle("latitude_of_origin"),
                Longitude = given.Longitude("central_meridian"),
                Scale = given.Ratio("scale_factor"),
            }
        );

    /// <summary>IOGP 373-7-2, method 9808: westing and southing are those of the usual method, negated about the false origin.</summary>
    private static PlaneForm SouthOrientated(PlaneParameters given, Ellipsoid ellipsoid)
    {
        var usual = TransverseMercator(given, ellipsoid);
        return usual with
        {
            FalseEasting = -usual.FalseEasting,
            FalseNorthing = -usual.FalseNorthing,
            Axes = PlaneAxes.WestSouth,
        };
    }

    /// <summary>
    /// One parallel with a scale is two equal parallels with that scale; a scale other than 1 with two parallels, which
    /// ESRI's dialect allows, multiplies likewise.
    /// </summary>
    private static PlaneForm LambertConic(PlaneParameters given, Ellipsoid ellipsoid)
    {
        var latitude = given.Angle("latitude_of_origin");
        var one = given.Has("standard_parallel_1") ? given.Angle("standard_parallel_1") : latitude;
        var two = given.Has("standard_parallel_2") ? given.Angle("standard_parallel_2") : one;
        var scale = given.Has("standard_parallel_2") && !given.Has("scale_factor") ? 1 : given.Ratio("scale_factor");
        return WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.LambertConic,
                Latitude = latitude,
                Longitude = given.Longitude("central_meridian"),
                FirstParallel = Math.Min(one, two),
                SecondParallel = Math.Max(one, two),
                Scale = scale,
            }
        );
    }

    private static PlaneForm Albers(PlaneParameters given, Ellipsoid ellipsoid)
    {
        var one = given.Angle("standard_parallel_1");
        var two = given.Angle("standard_parallel_2");
        return WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.Albers,
                Latitude = given.Angle("latitude_of_center", "latitude_of_origin"),
                Longitude = given.Longitude("longitude_of_center", "central_meridian"),
                FirstParallel = Math.Min(one, two),
                SecondParallel = Math.Max(one, two),
            }
        );
    }

    private static PlaneForm LambertAzimuthal(PlaneParameters given, Ellipsoid ellipsoid) =>
        ellipsoid.IsSphere
            ? throw given.Refuse("lies on a sphere, for which no right result is known here")
            : WithFalseOrigin(
                given,
                new PlaneForm
                {
                    Method = PlaneMethod.LambertAzimuthal,
                    Latitude = given.Angle("latitude_of_center", "latitude_of_origin"),
                    Longitude = given.Longitude("longitude_of_center", "central_meridian"),
                }
            );

    private static PlaneForm ObliqueStereographic(PlaneParameters given, Ellipsoid ellipsoid) =>
        WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.ObliqueStereographic,
                Latitude = given.Angle("latitude_of_origin"),
                Longitude = given.Longitude("central_meridian"),
                Scale = given.Ratio("scale_factor"),
            }
        );

    private static PlaneForm ObliqueMercator(PlaneParameters given, Ellipsoid ellipsoid)
    {
        var azimuth = given.Direction("azimuth");
        return WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.ObliqueMercator,
                Latitude = given.Angle("latitude_of_center"),
                Longitude = given.Longitude("longitude_of_center"),
                Azimuth = azimuth,
                GridAngle = given.Has("rectified_grid_angle", "xy_plane_rotation")
                    ? given.Direction("rectified_grid_angle", "xy_plane_rotation")
                    : azimuth,
                Scale = given.Ratio("scale_factor"),
            }
        );
    }

    private static PlaneForm ObliqueMercatorFromNaturalOrigin(PlaneParameters given, Ellipsoid ellipsoid) =>
        HotineOrigin.MoveToCentre(ObliqueMercator(given, ellipsoid), ellipsoid);

    private static PlaneForm Krovak(PlaneParameters given, Ellipsoid ellipsoid) =>
        WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.Krovak,
                Latitude = given.Angle("latitude_of_center"),
                Longitude = given.Longitude("longitude_of_center"),
                Azimuth = given.Angle("azimuth"),
                FirstParallel = given.Angle("pseudo_standard_parallel_1"),
                Scale = given.Ratio("scale_factor"),
                Axes = KrovakAxes(given),
            }
        );

    /// <summary>ESRI's dialect says the axes by three parameters; in GDAL's they are south, west unless its AXIS words differ.</summary>
    private static PlaneAxes KrovakAxes(PlaneParameters given)
    {
        if (!given.Has("x_scale", "y_scale", "xy_plane_rotation"))
        {
            return PlaneAxes.SouthWest;
        }

        var turn = (given.Ratio("x_scale"), given.Ratio("y_scale"), given.Angle("xy_plane_rotation"));
        return turn switch
        {
            (-1, 1, > 89.999999 and < 90.000001) => PlaneAxes.EastNorth,
            (1, 1, 0) => PlaneAxes.SouthWest,
            _ => throw given.Refuse("turns its axes in a way that is not understood"),
        };
    }

    /// <summary>A standard parallel is a scale at the equator: IOGP 373-7-2, method 9805.</summary>
    private static PlaneForm Mercator(PlaneParameters given, Ellipsoid ellipsoid)
    {
        given.Expect("latitude_of_origin", 0);
        double scale;
        if (given.Has("standard_parallel_1"))
        {
            given.Expect("scale_factor", 1);
            var parallel = Degrees.ToRadians(given.Angle("standard_parallel_1"));
            var sine = Math.Sin(parallel);
            scale = Math.Cos(parallel) / Math.Sqrt(1 - (ellipsoid.EccentricitySquared * sine * sine));
        }
        else
        {
            scale = given.Ratio("scale_factor");
        }

        return WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.Mercator,
                Longitude = given.Longitude("central_meridian"),
                Scale = scale,
            }
        );
    }

    private static PlaneForm Cassini(PlaneParameters given, Ellipsoid ellipsoid)
    {
        given.Expect("scale_factor", 1);
        return WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.Cassini,
                Latitude = given.Angle("latitude_of_origin"),
                Longitude = given.Longitude("central_meridian"),
            }
        );
    }

    private static PlaneForm Polyconic(PlaneParameters given, Ellipsoid ellipsoid)
    {
        given.Expect("scale_factor", 1);
        return WithFalseOrigin(
            given,
            new PlaneForm
            {
                Method = PlaneMethod.Polyconic,
                Latitude = given.Angle("latitude_of_origin"),
                Longitude = given.Longitude("central_meridian"),
            }
        );
    }

    private static PlaneForm WithFalseOrigin(PlaneParameters given, PlaneForm form) =>
        form with
        {
            FalseEasting = given.Length("false_easting"),
            FalseNorthing = given.Length("false_northing"),
        };
}
