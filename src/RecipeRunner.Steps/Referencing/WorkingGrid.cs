using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Says where areas and distances may be measured.</summary>
public static class WorkingGrid
{
    /// <summary>
    /// Refuses a system in which areas mean nothing: geographic ones, and Mercator's projection about the equator, on a sphere
    /// or not, which is made for charts and web maps (at 50 degrees of latitude it doubles areas).
    /// </summary>
    /// <param name="system">The system of the layer that is to be measured.</param>
    /// <param name="what">The layer as people would name it, such as <c>basins.shp</c>.</param>
    /// <param name="extent">The layer's extent, for suggesting a grid; null where it is not at hand.</param>
    /// <exception cref="RefusedException">RR0350: the system is geographic. RR0351: the grid is unfit for areas.</exception>
    public static void RequireForAreas(ReferenceSystem system, string what, Bounds? extent = null)
    {
        ArgumentNullException.ThrowIfNull(system);
        var known = KnownSystem.Of(system);
        if (known.Definition.Form is not { } form)
        {
            throw Refuse(
                "RR0350",
                what,
                $"The coordinates of {what} are degrees ({system.Label}); areas and distances cannot be measured in them.",
                Suggest(extent)
            );
        }

        if (form.Method is PlaneMethod.WebMercator or PlaneMethod.Mercator)
        {
            throw Refuse(
                "RR0351",
                what,
                $"{what} is in {system.Label} ({system.Name}), a Mercator projection made for charts and web maps: areas in it "
                    + "grow with latitude and cannot be used.",
                UtmZone.Suggest(known.Area)
            );
        }
    }

    private static string Suggest(Bounds? extent) =>
        UtmZone.Suggest(
            extent is { IsEmpty: false } box
                ? new AreaOfUse(box.West, box.South, box.East, box.North)
                : new AreaOfUse(-180, -90, 180, 90)
        );

    private static RefusedException Refuse(string code, string what, string why, string mend) =>
        new(Finding.Error(code, new Place(what), why, mend));
}
