using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Suggests a working grid that exists everywhere people live: the zones of universal transverse Mercator on WGS 84.
/// Common practice, no source.
/// </summary>
internal static class UtmZone
{
    private const double WidestForOneZone = 12;

    /// <summary>A sentence for a mend, naming the zone in the middle of an area where one zone can do.</summary>
    public static string Suggest(AreaOfUse area) =>
        area.Width <= WidestForOneZone && Math.Abs(area.Centre.Y) <= 84
            ? $"A grid for the area would be {CodeAt(area.Centre)}; a national grid may suit better: .To(Crs(\"EPSG:…\"))"
            : "Use a projected system made for the area: .To(Crs(\"EPSG:…\"))";

    private static string CodeAt(Location degrees)
    {
        var zone = Math.Clamp((int)Math.Floor((Degrees.Wrap(degrees.X, 0) + 180) / 6) + 1, 1, 60);
        return FormattableString.Invariant($"EPSG:{(degrees.Y < 0 ? 32700 : 32600) + zone}");
    }
}
