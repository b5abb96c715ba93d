using System.Collections.Immutable;
using System.Text;
using System.Text.Json;
using NetTopologySuite.Geometries;
using NetTopologySuite.IO.Converters;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads GeoJSON (RFC 7946: longitude and latitude on WGS 84). A <c>crs</c> member of the older 2008 form is honoured
/// where it names a code.
/// </summary>
internal static class GeoJsonSource
{
    private const string OwnId = "id";

    private static readonly JsonSerializerOptions Options = new()
    {
        Converters = { new GeoJsonConverterFactory(RegionGeometry.Factory) },
        ReadCommentHandling = JsonCommentHandling.Disallow,
    };

    /// <summary>Reads all features.</summary>
    /// <exception cref="RefusedException">It is not JSON, or not a collection of features; with every problem found.</exception>
    public static FeatureFile Read(StepContext context, string name)
    {
        using var document = Parse(context, name);
        var root = document.RootElement;
        if (
            !IsOfType(root, "FeatureCollection")
            || !root.TryGetProperty("features", out var list)
            || list.ValueKind != JsonValueKind.Array
        )
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0221",
                    new Place(name),
                    "It is JSON, but not a FeatureCollection.",
                    "Export the layer as GeoJSON (RFC 7946)."
                )
            );
        }

        var fields = Fields(list);
        var problems = new Problems();
        var features = list.EnumerateArray()
            .Select((feature, i) => FeatureOf(feature, i + 1, fields, name, problems))
            .ToImmutableArray();
        problems.ThrowIfAny();
        var (system, refusal) = FeatureFile.ReadSystem(() => SystemOf(root, name));
        return new FeatureFile(name, fields, features, system, refusal);
    }

    private static JsonDocument Parse(StepContext context, string name)
    {
        using var stream = context.OpenInput(name);
        Utf8Text.Require(stream, name);
        stream.Position = 0;
        try
        {
            return JsonDocument.Parse(stream);
        }
        catch (JsonException failure)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0220",
                    new Place(name, (int)(failure.LineNumber ?? 0) + 1, (int)(failure.BytePositionInLine ?? 0) + 1),
                    "It is not valid JSON here. Was the file cut?",
                    "Copy or export the file again."
                )
            );
        }
    }

    private static ImmutableArray<string> Fields(JsonElement features) =>
        [
            .. features
                .EnumerateArray()
                .Where(feature => feature.ValueKind == JsonValueKind.Object)
                .Select(feature => feature.TryGetProperty("properties", out var properties) ? properties : default)
                .Where(properties => properties.ValueKind == JsonValueKind.Object)
                .SelectMany(properties => properties.EnumerateObject().Select(property => property.Name))
                .Concat(features.EnumerateArray().Any(HasOwnId) ? [OwnId] : [])
                .Distinct(StringComparer.Ordinal),
        ];

    /// <summary>RFC 7946, section 3.2: a feature's identifier stands beside its properties. It serves as a column where those have none of its name.</summary>
    private static bool HasOwnId(JsonElement feature) =>
        feature.ValueKind == JsonValueKind.Object && feature.TryGetProperty(OwnId, out _);

    private static FileFeature FeatureOf(
        JsonElement feature,
        int number,
        ImmutableArray<string> fields,
        string name,
        Problems problems
    )
    {
        var place = new Place(name, Item: FormattableString.Invariant($"feature {number}"));
        if (!IsOfType(feature, "Feature"))
        {
            problems.Add("RR0222", place, "It is not a Feature.", "Export the layer as GeoJSON (RFC 7946).");
            return new FileFeature(number, null, []);
        }

        var properties =
            feature.TryGetProperty("properties", out var found) && found.ValueKind == JsonValueKind.Object
                ? found
                : default;
        return new FileFeature(
            number,
            GeometryOf(feature, place, problems),
            [.. fields.Select(field => TextOf(field == OwnId && !Has(properties, field) ? feature : properties, field))]
        );
    }

    private static Geometry? GeometryOf(JsonElement feature, Place place, Problems problems)
    {
        if (!feature.TryGetProperty("geometry", out var geometry) || geometry.ValueKind == JsonValueKind.Null)
        {
            return null;
        }

        try
        {
            return geometry.Deserialize<Geometry>(Options);
        }
        catch (Exception failure)
            when (failure is JsonException or ArgumentException or InvalidOperationException or FormatException)
        {
            problems.Add(
                "RR0223",
                place,
                $"Its geometry cannot be read: {failure.Message}",
                "Correct the coordinates; a ring has at least four positions, the last equal to the first."
            );
            return null;
        }
    }

    private static bool Has(JsonElement element, string name) =>
        element.ValueKind == JsonValueKind.Object && element.TryGetProperty(name, out _);

    private static string TextOf(JsonElement properties, string field)
    {
        if (!Has(properties, field))
        {
            return "";
        }

        var value = properties.GetProperty(field);
        return value.ValueKind switch
        {
            JsonValueKind.Null => "",
            JsonValueKind.String => value.GetString()!.Trim(),
            _ => value.GetRawText(),
        };
    }

    private static ReferenceSystem SystemOf(JsonElement root, string name)
    {
        var code = "EPSG:4326";
        if (root.TryGetProperty("crs", out var crs) && crs.ValueKind == JsonValueKind.Object)
        {
            code = NamedCode(crs, name);
        }

        return ReferenceSystems.Find(code);
    }

    /// <summary>The code in a <c>crs</c> member such as <c>urn:ogc:def:crs:EPSG::25833</c>.</summary>
    private static string NamedCode(JsonElement crs, string name)
    {
        var text =
            crs.TryGetProperty("properties", out var properties)
            && properties.ValueKind == JsonValueKind.Object
            && properties.TryGetProperty("name", out var value)
                ? value.ToString()
                : "";
        if (text.EndsWith("CRS84", StringComparison.Ordinal))
        {
            return "EPSG:4326";
        }

        var digits = text[(text.LastIndexOf(':') + 1)..];
        return
            text.Contains("EPSG", StringComparison.OrdinalIgnoreCase)
            && digits.Length > 0
            && digits.All(char.IsAsciiDigit)
            ? "EPSG:" + digits
            : throw new RefusedException(
                Finding.Error(
                    "RR0224",
                    new Place(name, Item: "crs"),
                    $"Its crs member says '{text}', which names no EPSG code.",
                    "Export the layer as GeoJSON (RFC 7946), in longitude and latitude on WGS 84."
                )
            );
    }

    private static bool IsOfType(JsonElement element, string type) =>
        element.ValueKind == JsonValueKind.Object
        && element.TryGetProperty("type", out var value)
        && value.ValueKind == JsonValueKind.String
        && value.ValueEquals(Encoding.UTF8.GetBytes(type));
}
