using System.Text.Encodings.Web;
using System.Text.Json;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Emitting;

/// <summary>
/// Writes features as GeoJSON (RFC 7946): longitude and latitude on WGS 84 to eight decimals (about a millimetre), outer
/// rings counter-clockwise, numbers as numbers and blanks as null.
/// </summary>
internal static class GeoJsonLayer
{
    private const int Decimals = 8;

    private static readonly JsonWriterOptions Options = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <summary>Writes the file.</summary>
    /// <returns>Its path.</returns>
    public static IReadOnlyList<string> Write(
        StepContext context,
        string name,
        FeatureTable features,
        ReferenceSystem system
    )
    {
        var toDegrees = GridTransform.Between(system, ReferenceSystems.Find("EPSG:4326"));
        var path = $"layers/{name}";
        using var stream = context.CreateOutput(path);
        using var writer = new Utf8JsonWriter(stream, Options);
        writer.WriteStartObject();
        writer.WriteString("type", "FeatureCollection");
        writer.WriteStartArray("features");
        for (var row = 0; row < features.Shapes.Length; row++)
        {
            WriteFeature(writer, features, row, toDegrees);
        }

        writer.WriteEndArray();
        writer.WriteEndObject();
        context.State("positions", $"WGS 84, {toDegrees.Operation.Text}");
        return [path];
    }

    private static void WriteFeature(Utf8JsonWriter writer, FeatureTable features, int row, GridTransform toDegrees)
    {
        writer.WriteStartObject();
        writer.WriteString("type", "Feature");
        writer.WriteStartObject("properties");
        foreach (var column in features.Attributes.Columns)
        {
            WriteProperty(writer, column, row);
        }

        writer.WriteEndObject();
        writer.WriteStartObject("geometry");
        var shape = features.Shapes[row];
        if (shape.Region is { } region)
        {
            WriteRegion(writer, region, toDegrees);
        }
        else
        {
            writer.WriteString("type", "Point");
            writer.WritePropertyName("coordinates");
            WritePosition(writer, Degrees([shape.Place], toDegrees)[0]);
        }

        writer.WriteEndObject();
        writer.WriteEndObject();
    }

    private static void WriteProperty(Utf8JsonWriter writer, Column column, int row)
    {
        if (column.Kind == ColumnKind.Text)
        {
            writer.WriteString(column.Name, column.Texts[row]);
        }
        else if (column.Numbers[row] is null)
        {
            writer.WriteNull(column.Name);
        }
        else
        {
            writer.WritePropertyName(column.Name);
            writer.WriteRawValue(CellText.Of(column, row));
        }
    }

    private static void WriteRegion(Utf8JsonWriter writer, Region region, GridTransform toDegrees)
    {
        var single = region.Parts.Length == 1;
        writer.WriteString("type", single ? "Polygon" : "MultiPolygon");
        writer.WriteStartArray("coordinates");
        foreach (var part in region.Parts)
        {
            if (!single)
            {
                writer.WriteStartArray();
            }

            foreach (var ring in part.Rings)
            {
                WriteRing(writer, ring, toDegrees);
            }

            if (!single)
            {
                writer.WriteEndArray();
            }
        }

        writer.WriteEndArray();
    }

    private static void WriteRing(Utf8JsonWriter writer, Ring ring, GridTransform toDegrees)
    {
        var positions = Degrees([.. ring.Vertices], toDegrees);
        writer.WriteStartArray();
        foreach (var position in positions)
        {
            WritePosition(writer, position);
        }

        WritePosition(writer, positions[0]);
        writer.WriteEndArray();
    }

    private static Location[] Degrees(Location[] places, GridTransform toDegrees)
    {
        var degrees = new Location[places.Length];
        toDegrees.Apply(places, degrees);
        return degrees;
    }

    private static void WritePosition(Utf8JsonWriter writer, Location degrees)
    {
        writer.WriteStartArray();
        writer.WriteNumberValue(Math.Round(degrees.X, Decimals));
        writer.WriteNumberValue(Math.Round(degrees.Y, Decimals));
        writer.WriteEndArray();
    }
}
