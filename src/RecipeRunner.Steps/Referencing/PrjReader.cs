using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Finds the reference system that the text of a .prj file means, in GDAL's or ESRI's dialect of WKT 1.</summary>
public static class PrjReader
{
    /// <summary>
    /// The registry's system with the same datum, method, parameters and unit, whatever the names; else a system without a
    /// code, where its projection proves itself. Where several codes define one grid, the one that the text claims is taken,
    /// else one of the same name, one that counts from the same meridian, one whose
    /// official axes are east, north, the lowest number: in that order. Shifts to WGS 84 in the text (TOWGS84) are not
    /// used: datums follow the registry.
    /// </summary>
    /// <param name="text">The whole text of the file.</param>
    /// <param name="file">The file as the recipe names it, for messages.</param>
    /// <exception cref="RefusedException">
    /// RR0310: the text is cut off, broken or too long. RR0311: it holds something that is not understood.
    /// RR0312: its projection does not prove itself. RR0303, RR0304: it means a system that cannot be used.
    /// </exception>
    public static ReferenceSystem Match(string text, string file)
    {
        ArgumentNullException.ThrowIfNull(text);
        ArgumentNullException.ThrowIfNull(file);
        var where = new Place(file);
        var definition = new DefinitionReader(where, DefinitionReader.MendOfFile).Read(WktReader.Read(text, file));
        RefuseOtherFigure(definition, where);
        var alike = RegistryDefinitions.Like(definition);
        return alike.Length > 0
            ? KnownSystem.OfEntry(Best(alike, definition)).Facts
            : KnownSystem.OfText(text, file).Facts;
    }

    private static SystemEntry Best(RegistryDefinition[] alike, SystemDefinition wanted) =>
        alike
            .OrderBy(one => one.Entry.Code == wanted.ClaimedCode ? 0 : 1)
            .ThenBy(one => wanted.Name == one.Entry.Name || wanted.Name == one.Entry.Alias ? 0 : 1)
            .ThenBy(one => one.Definition.MeridianDegrees == wanted.MeridianDegrees ? 0 : 1)
            .ThenBy(one => one.Definition.SaysEastNorth ? 0 : 1)
            .ThenBy(one => one.Entry.Code.Length)
            .ThenBy(one => one.Entry.Code, StringComparer.Ordinal)
            .First()
            .Entry;

    /// <summary>A datum that the registry knows on a figure that is not the datum's: one of the two is wrong.</summary>
    private static void RefuseOtherFigure(SystemDefinition definition, Place where)
    {
        if (RegistryDefinitions.FigureOf(definition.Datum) is { } figure && !figure.IsLike(definition.Ellipsoid))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0311",
                    where,
                    $"The definition puts the datum {definition.Datum.Name} on the ellipsoid {definition.Ellipsoid.Name}; "
                        + $"the registry has it on {figure.Name}.",
                    "Ask the source of the data which is right, then say the system in the recipe: crs: Crs(\"EPSG:…\")"
                )
            );
        }
    }
}
