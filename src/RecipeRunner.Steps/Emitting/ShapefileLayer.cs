using System.Text;
using NetTopologySuite.Geometries;
using NetTopologySuite.IO.Esri;
using NetTopologySuite.IO.Esri.Dbf.Fields;
using NetTopologySuite.IO.Esri.Shapefiles.Writers;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Shapes;
using Shape = RecipeRunner.Model.Space.Shape;

namespace RecipeRunner.Steps.Emitting;

/// <summary>
/// Writes features as a shapefile (ESRI Shapefile Technical Description, 1998) with attributes in UTF-8. The date in the
/// attribute file's header is always 1 January 1980, so that bytes do not depend on the clock.
/// </summary>
internal static class ShapefileLayer
{
    private const int LongestText = 254;
    private const int LongestName = 10;

    /// <summary>Writes the files of one shapefile.</summary>
    /// <returns>Their paths.</returns>
    public static IReadOnlyList<string> Write(
        StepContext context,
        string name,
        FeatureTable features,
        ReferenceSystem system
    )
    {
        var names = FieldNames(context, name, features.Attributes);
        RequireRoom(name, features.Attributes);
        using var shp = new MemoryStream();
        using var shx = new MemoryStream();
        using var dbf = new MemoryStream();
        using var prj = new MemoryStream();
        WriteFeatures(features, names, system, (shp, shx, dbf, prj));
        var attributes = dbf.ToArray();
        (attributes[1], attributes[2], attributes[3]) = (80, 1, 1);
        return
        [
            Put(context, $"layers/{name}.shp", shp.ToArray()),
            Put(context, $"layers/{name}.shx", shx.ToArray()),
            Put(context, $"layers/{name}.dbf", attributes),
            Put(context, $"layers/{name}.prj", Encoding.UTF8.GetBytes(system.Wkt)),
            Put(context, $"layers/{name}.cpg", "UTF-8"u8.ToArray()),
        ];
    }

    private static void RequireRoom(string layer, Table table)
    {
        var problems = new Problems();
        foreach (var column in table.Columns)
        {
            foreach (var text in column.Texts.Where(text => Encoding.UTF8.GetByteCount(text) > LongestText))
            {
                problems.Add(
                    "RR0604",
                    new Place($"layers/{layer}.shp", Item: $"column {column.Name}"),
                    FormattableString.Invariant(
                        $"A shapefile holds at most {LongestText} bytes of text a cell; '{text[..20]}…' has {Encoding.UTF8.GetByteCount(text)}."
                    ),
                    $"Emit \"{layer}.geojson\" instead, or shorten the text."
                );
            }
        }

        problems.ThrowIfAny();
    }

    private static void WriteFeatures(
        FeatureTable features,
        string[] names,
        ReferenceSystem system,
        (Stream Shp, Stream Shx, Stream Dbf, Stream Prj) files
    )
    {
        var columns = features.Attributes.Columns;
        var fields = columns.Select((column, c) => FieldFor(column, names[c])).ToArray();
        var type = features.Kind == GeometryKind.Point ? ShapeType.Point : ShapeType.Polygon;
        var options = new ShapefileWriterOptions(type, fields) { Encoding = new UTF8Encoding(false) };
        using var writer = Shapefile.OpenWrite(files.Shp, files.Shx, files.Dbf, files.Prj, options);
        for (var row = 0; row < features.Shapes.Length; row++)
        {
            for (var c = 0; c < fields.Length; c++)
            {
                fields[c].Value = columns[c].Kind == ColumnKind.Text ? columns[c].Texts[row] : columns[c].Numbers[row];
            }

            writer.Geometry = GeometryOf(features.Shapes[row], system.MetresPerUnit);
            writer.Write();
        }
    }

    /// <summary>In the system's own unit, as its definition in the <c>.prj</c> says.</summary>
    private static Geometry GeometryOf(Shape shape, double metresPerUnit)
    {
        var geometry = shape.Region is { } region ? RegionGeometry.Of(region) : RegionGeometry.Of(shape.Place);
        foreach (var coordinate in geometry.Coordinates)
        {
            coordinate.X /= metresPerUnit;
            coordinate.Y /= metresPerUnit;
        }

        return geometry is Polygon polygon ? RegionGeometry.Factory.CreateMultiPolygon([polygon]) : geometry;
    }

    private static DbfField FieldFor(Column column, string name)
    {
        if (column.Kind == ColumnKind.Text)
        {
            var longest = column.Texts.Select(Encoding.UTF8.GetByteCount).DefaultIfEmpty(1).Max();
            return new DbfCharacterField(name, Math.Clamp(longest, 1, LongestText));
        }

        var largest = column.Numbers.Select(number => Math.Abs(number ?? 0)).DefaultIfEmpty(0).Max();
        var whole = Math.Max(1, (int)Math.Floor(Math.Log10(Math.Max(1, largest))) + 1);
        return new DbfNumericDoubleField(name, 19, Math.Clamp(Math.Min(column.Decimals, 16 - whole), 0, 15));
    }

    /// <summary>Names of at most ten bytes: longer ones are cut, and numbered where that makes them meet.</summary>
    private static string[] FieldNames(StepContext context, string layer, Table table)
    {
        var taken = new HashSet<string>(StringComparer.OrdinalIgnoreCase);
        var changed = new List<string>();
        var names = table.Columns.Select(column => FieldName(column.Name, taken, changed)).ToArray();
        if (changed.Count > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0603",
                    new Place($"layers/{layer}.shp"),
                    $"A shapefile's column names have at most ten letters, so some were shortened: {string.Join(", ", changed)}.",
                    $"Emit \"{layer}.geojson\" as well to keep them whole."
                )
            );
        }

        return names;
    }

    private static string FieldName(string name, HashSet<string> taken, List<string> changed)
    {
        var plain = new string([
            .. name.Select(letter => char.IsAsciiLetterOrDigit(letter) || letter == '_' ? letter : '_'),
        ]);
        var cut = plain.Length <= LongestName ? plain : plain[..LongestName];
        for (var number = 2; !taken.Add(cut); number++)
        {
            var tail = FormattableString.Invariant($"_{number}");
            cut = plain[..Math.Min(plain.Length, LongestName - tail.Length)] + tail;
        }

        if (!string.Equals(cut, name, StringComparison.Ordinal))
        {
            changed.Add($"{name} as {cut}");
        }

        return cut;
    }

    private static string Put(StepContext context, string path, byte[] bytes)
    {
        using var stream = context.CreateOutput(path);
        stream.Write(bytes);
        return path;
    }
}
