using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Refuses coordinates that do not say their reference system, and says what the numbers look like.</summary>
internal static class MissingSystem
{
    /// <summary>The refusal.</summary>
    /// <param name="file">The file.</param>
    /// <param name="extent">The rectangle about its coordinates.</param>
    public static RefusedException Refusal(string file, Bounds extent)
    {
        var span = extent.IsEmpty
            ? ""
            : string.Create(
                CultureInfo.InvariantCulture,
                $" (x {extent.West:0.###} to {extent.East:0.###}, y {extent.South:0.###} to {extent.North:0.###})"
            );
        var degrees = extent is { West: >= -180, East: <= 180, South: >= -90, North: <= 90 };
        var mend = degrees
            ? $"The numbers look like degrees{span}. If they came from a satellite receiver, add   crs: Crs(\"EPSG:4326\")"
            : $"The numbers look like lengths in a projected system{span}. Ask whoever made the file, then add   crs: Crs(\"EPSG:…\")";
        return new RefusedException(
            Finding.Error("RR0203", new Place(file), "The file does not say its reference system.", mend)
        );
    }
}
