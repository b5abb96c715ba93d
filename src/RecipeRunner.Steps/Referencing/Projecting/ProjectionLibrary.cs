using ProjNet.CoordinateSystems;
using ProjNet.CoordinateSystems.Transformations;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// The one place that builds transforms of the projection library: always from Greenwich degrees to metres on one
/// ellipsoid, so that it never sees a datum, a meridian or a unit of its own to get wrong.
/// </summary>
internal static class ProjectionLibrary
{
    private static readonly CoordinateSystemFactory Systems = new();

    /// <summary>The transforms from degrees to the plane and back, before axes are turned.</summary>
    public static (MathTransform ToPlane, MathTransform ToDegrees) Build(Ellipsoid ellipsoid, PlaneForm form)
    {
        var geographic = Geographic(ellipsoid, form);
        var (name, parameters) = Parameters(form);
        parameters.Add(new("false_easting", form.FalseEasting));
        parameters.Add(new("false_northing", form.FalseNorthing));
        var projected = Systems.CreateProjectedCoordinateSystem(
            "plane",
            geographic,
            Systems.CreateProjection(name, name, parameters),
            LinearUnit.Metre,
            new AxisInfo("East", AxisOrientationEnum.East),
            new AxisInfo("North", AxisOrientationEnum.North)
        );
        var factory = new CoordinateTransformationFactory();
        return (
            factory.CreateFromCoordinateSystems(geographic, projected).MathTransform,
            factory.CreateFromCoordinateSystems(projected, geographic).MathTransform
        );
    }

    /// <summary>The library ignores a cone's scale; a larger ellipsoid does the same.</summary>
    private static GeographicCoordinateSystem Geographic(Ellipsoid ellipsoid, PlaneForm form)
    {
        var scale = form.Method == PlaneMethod.LambertConic ? form.Scale : 1;
        var figure = Systems.CreateFlattenedSphere(
            "ellipsoid",
            ellipsoid.SemiMajorMetres * scale,
            ellipsoid.InverseFlattening,
            LinearUnit.Metre
        );
        return Systems.CreateGeographicCoordinateSystem(
            "degrees",
            AngularUnit.Degrees,
            Systems.CreateHorizontalDatum("datum", DatumType.HD_Geocentric, figure, null),
            PrimeMeridian.Greenwich,
            new AxisInfo("Lon", AxisOrientationEnum.East),
            new AxisInfo("Lat", AxisOrientationEnum.North)
        );
    }

    private static (string Name, List<ProjectionParameter> Parameters) Parameters(PlaneForm form) =>
        form.Method switch
        {
            PlaneMethod.TransverseMercator => ("transverse_mercator", [.. Origin(form), Scale(form)]),
            PlaneMethod.LambertConic => ("lambert_conformal_conic_2sp", [.. Origin(form), .. Parallels(form)]),
            PlaneMethod.Albers => ("albers_conic_equal_area", [.. Centre(form), .. Parallels(form)]),
            PlaneMethod.LambertAzimuthal => ("lambert_azimuthal_equal_area", [.. Centre(form)]),
            PlaneMethod.ObliqueStereographic => ("oblique_stereographic", [.. Origin(form), Scale(form)]),
            PlaneMethod.ObliqueMercator => (
                "hotine_oblique_mercator_azimuth_center",
                [
                    .. Centre(form),
                    Scale(form),
                    new("azimuth", form.Azimuth),
                    new("rectified_grid_angle", form.GridAngle),
                ]
            ),
            PlaneMethod.Krovak => (
                "krovak",
                [
                    .. Centre(form),
                    Scale(form),
                    new("azimuth", form.Azimuth),
                    new("pseudo_standard_parallel_1", form.FirstParallel),
                ]
            ),
            PlaneMethod.Mercator => ("mercator_1sp", [.. Origin(form), Scale(form)]),
            PlaneMethod.WebMercator => ("google_mercator", [.. Origin(form), Scale(form)]),
            PlaneMethod.Cassini => ("cassini_soldner", [.. Origin(form)]),
            PlaneMethod.Polyconic => ("polyconic", [.. Origin(form)]),
            _ => throw new InvalidOperationException($"There is no projection for {form.Method}."),
        };

    private static ProjectionParameter[] Origin(PlaneForm form) =>
        [new("latitude_of_origin", form.Latitude), new("central_meridian", form.Longitude)];

    private static ProjectionParameter[] Centre(PlaneForm form) =>
        [new("latitude_of_center", form.Latitude), new("longitude_of_center", form.Longitude)];

    private static ProjectionParameter[] Parallels(PlaneForm form) =>
        [new("standard_parallel_1", form.FirstParallel), new("standard_parallel_2", form.SecondParallel)];

    private static ProjectionParameter Scale(PlaneForm form) => new("scale_factor", form.Scale);
}
