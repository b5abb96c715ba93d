using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Looks into a layer file: features, geometry, reference system, extent, columns with a few values.</summary>
internal static class LayerPeek
{
    private const int ValuesShown = 3;

    public static List<(string Name, string Text)> Of(StepContext context, string name)
    {
        var file = FeatureFile.Read(context, name);
        var kinds = file
            .Features.GroupBy(feature => feature.Geometry?.GeometryType ?? "no geometry", StringComparer.Ordinal)
            .OrderBy(group => group.Key, StringComparer.Ordinal);
        var invalid = file
            .Features.Where(feature => feature.Geometry is { IsValid: false })
            .Select(feature => feature.Number)
            .ToArray();
        List<(string Name, string Text)> lines =
        [
            (
                "features",
                string.Join(
                    ", ",
                    kinds.Select(group =>
                        string.Create(CultureInfo.InvariantCulture, $"{group.Count():N0} {group.Key}")
                    )
                )
            ),
            ("system", SystemText(file)),
            ("extent", ExtentText(file.Extent)),
        ];
        if (invalid.Length > 0)
        {
            lines.Add(
                (
                    "caution",
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{invalid.Length} outlines are not valid, the first that of feature {invalid[0]}."
                    )
                )
            );
        }

        lines.AddRange(file.Fields.Select((field, f) => ("column", ColumnText(file, field, f))));
        return lines;
    }

    private static string SystemText(FeatureFile file) =>
        file.ReferenceSystem is { } system ? $"{system.Label}, {system.Name}"
        : file.SystemRefusal is { } refusal ? $"{refusal.Problems[0].What} Give crs: when reading."
        : "not said by the file; give crs: when reading";

    private static string ColumnText(FeatureFile file, string field, int f)
    {
        var values = file.Features.Select(feature => feature.Values[f]).ToArray();
        var distinct = values.Distinct(StringComparer.Ordinal).Count();
        var unique =
            distinct == values.Length && !values.Contains("", StringComparer.Ordinal)
                ? ", unique: can serve as id"
                : "";
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{field}: {string.Join(", ", values.Take(ValuesShown))}{(values.Length > ValuesShown ? ", …" : "")} ({distinct:N0} different{unique})"
        );
    }

    private static string ExtentText(Bounds extent) =>
        extent.IsEmpty
            ? "empty"
            : string.Create(
                CultureInfo.InvariantCulture,
                $"x {extent.West:0.######} to {extent.East:0.######}, y {extent.South:0.######} to {extent.North:0.######}"
            );
}
