using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Proves a projection that only a file defines and for which there are no control points: by what its method promises.
/// The natural origin lands on the false origin, the scale there is the one defined, and all over the area conformal
/// methods keep shapes and equal-area methods keep areas. Common practice, no source.
/// </summary>
internal static class PlaneProof
{
    private const double WorstScale = 1e-6;
    private const double WorstMetres = 0.001;
    private const double FarthestScale = 0.05;
    private const int PlacesAcross = 5;

    /// <summary>The area in which a system without a stated one is proved and used: about where its method is made for.</summary>
    public static AreaOfUse AreaOf(SystemDefinition definition)
    {
        if (definition.Form is not { } form)
        {
            return new AreaOfUse(-180, -90, 180, 90);
        }

        return form.Method switch
        {
            PlaneMethod.TransverseMercator => About(form.Longitude, 5, -80, 84),
            PlaneMethod.LambertConic or PlaneMethod.Albers => About(
                form.Longitude,
                30,
                form.FirstParallel - 15,
                form.SecondParallel + 15
            ),
            PlaneMethod.Mercator => About(form.Longitude, 179, -80, 80),
            PlaneMethod.LambertAzimuthal => About(form.Longitude, 20, form.Latitude - 20, form.Latitude + 20),
            PlaneMethod.Cassini => About(form.Longitude, 2, form.Latitude - 2, form.Latitude + 2),
            _ => About(form.Longitude, 5, form.Latitude - 5, form.Latitude + 5),
        };
    }

    /// <summary>Refuses a system whose projection does not do what its method promises.</summary>
    /// <exception cref="RefusedException">RR0312.</exception>
    public static void Check(KnownSystem system, string file)
    {
        if (system.Definition.Form is { } form && FirstFlaw(system, form) is { } flaw)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0312",
                    new Place(file),
                    $"The registry has no system with the parameters of \"{system.Definition.Name}\", and as the file "
                        + $"defines it, it cannot be relied on: {flaw}.",
                    "If the system has a code, say it in the recipe: crs: Crs(\"EPSG:…\")"
                )
            );
        }
    }

    private static string? FirstFlaw(KnownSystem system, PlaneForm form)
    {
        if (form.Method is PlaneMethod.WebMercator or PlaneMethod.Krovak)
        {
            return "this method is only used as the registry defines it";
        }

        if (form.Axes != PlaneAxes.EastNorth)
        {
            return "grids with other axes than east and north are only used as the registry defines them";
        }

        if (Math.Abs(form.Scale - 1) > FarthestScale)
        {
            return "its scale is far from 1";
        }

        var projection = system.Projection!;
        var ellipsoid = system.Definition.Ellipsoid;
        var origin = projection.ToPlane(new Location(form.Longitude, form.Latitude));
        if (!(origin.DistanceTo(new Location(form.FalseEasting, form.FalseNorthing)) <= WorstMetres))
        {
            return "its natural origin does not land on its false origin";
        }

        var trueLatitude = form.Method is PlaneMethod.LambertConic or PlaneMethod.Albers
            ? form.FirstParallel
            : form.Latitude;
        var atOrigin = LocalScale.At(projection, ellipsoid, new Location(form.Longitude, trueLatitude));
        if (!(Math.Abs(atOrigin.AlongParallel - form.Scale) <= WorstScale))
        {
            return "its scale at the origin is not the one defined";
        }

        return Lattice(system.Area)
            .Select(place => LocalScale.At(projection, ellipsoid, place))
            .All(scale => Keeps(form, scale))
            ? null
            : "it does not keep what its method promises to keep";
    }

    private static bool Keeps(PlaneForm form, LocalScale scale) =>
        scale.Area > 0
        && (!form.IsConformal || scale.Most / scale.Least - 1 <= WorstScale)
        && (!form.IsEqualArea || Math.Abs(scale.Area - 1) <= WorstScale);

    private static IEnumerable<Location> Lattice(AreaOfUse area) =>
        from i in Enumerable.Range(0, PlacesAcross)
        from j in Enumerable.Range(0, PlacesAcross)
        select new Location(
            area.West + (area.Width * i / (PlacesAcross - 1)),
            area.South + ((area.North - area.South) * j / (PlacesAcross - 1))
        );

    private static AreaOfUse About(double longitude, double sideways, double south, double north) =>
        new(
            Degrees.Wrap(longitude - sideways, 0),
            Math.Max(-85, south),
            Degrees.Wrap(longitude + sideways, 0),
            Math.Min(85, north)
        );
}
