using System.Globalization;
using RecipeRunner.Steps.Peeking;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Emitting;

/// <summary>Reads emitted layers and tables back, value by value, so that two of them can be compared.</summary>
public static class EmittedValues
{
    /// <summary>The values of a file, in its order: row or feature, column or coordinate, text.</summary>
    /// <param name="path">
    /// A file that a study's steps wrote. Of a shapefile the <c>.shp</c> gives coordinates and the <c>.dbf</c> attributes.
    /// </param>
    public static IEnumerable<(string Row, string Column, string Text)> Read(string path) =>
        Path.GetExtension(path) switch
        {
            ".csv" => Table(path),
            ".shp" => Coordinates(Features(path)),
            ".dbf" => Attributes(Features(Path.ChangeExtension(path, ".shp"))),
            ".geojson" => Coordinates(Features(path)).Concat(Attributes(Features(path))),
            _ => [("whole", "bytes", Convert.ToHexString(File.ReadAllBytes(path)))],
        };

    private static IEnumerable<(string Row, string Column, string Text)> Table(string path)
    {
        using var text = TextInput.Open(Beside(path), Path.GetFileName(path));
        using var reader = CsvText.Open(text);
        var names = CsvText.Names(reader, Path.GetFileName(path));
        foreach (var (line, cells) in Rows(reader))
        {
            var row = FormattableString.Invariant($"line {line} ({cells[0]})");
            for (var column = 0; column < Math.Min(names.Length, cells.Length); column++)
            {
                yield return (row, names[column], cells[column]);
            }
        }
    }

    private static IEnumerable<(int Line, string[] Cells)> Rows(nietras.SeparatedValues.SepReader reader)
    {
        while (reader.MoveNext())
        {
            yield return (CsvText.LineOf(reader.Current), reader.Current[..].ToStringsArray());
        }
    }

    private static FeatureFile Features(string path) => FeatureFile.Read(Beside(path), Path.GetFileName(path));

    private static PeekContext Beside(string path) =>
        new(Path.GetDirectoryName(Path.GetFullPath(path))!, CancellationToken.None);

    private static string Name(FileFeature feature) =>
        FormattableString.Invariant($"feature {feature.Number} ({feature.Values.FirstOrDefault()})");

    private static IEnumerable<(string Row, string Column, string Text)> Attributes(FeatureFile file) =>
        file.Features.SelectMany(feature =>
            file.Fields.Zip(feature.Values, (field, value) => (Name(feature), field, value))
        );

    private static IEnumerable<(string Row, string Column, string Text)> Coordinates(FeatureFile file)
    {
        foreach (var feature in file.Features.Where(feature => feature.Geometry is not null))
        {
            var vertices = feature.Geometry!.Coordinates;
            for (var v = 0; v < vertices.Length; v++)
            {
                yield return (Name(feature), FormattableString.Invariant($"vertex {v + 1} x"), Text(vertices[v].X));
                yield return (Name(feature), FormattableString.Invariant($"vertex {v + 1} y"), Text(vertices[v].Y));
            }
        }
    }

    private static string Text(double number) => number.ToString("R", CultureInfo.InvariantCulture);
}
