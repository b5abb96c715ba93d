using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using NetTopologySuite.Geometries;
using NetTopologySuite.IO.Esri;
using NetTopologySuite.IO.Esri.Shapefiles.Readers;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads a shapefile (ESRI Shapefile Technical Description, 1998). Its files are checked against their own headers and
/// against each other first, because the library that reads them takes cut files for whole ones.
/// </summary>
internal static class ShapefileSource
{
    /// <summary>Reads all features.</summary>
    /// <exception cref="RefusedException">A part is missing, cut, or does not fit the others.</exception>
    public static FeatureFile Read(StepContext context, string name)
    {
        var stem = name[..^4];
        var shp = ReadAll(context, name);
        var shx = ReadAll(context, Sibling(context, stem, "shx", name));
        var dbf = ReadAll(context, Sibling(context, stem, "dbf", name));
        ShapefileCheck.Require(name, shp, shx, dbf);
        var encoding = DbfEncoding.Find(context, name, dbf, TextOf(context, stem, "cpg"));
        var prj = TextOf(context, stem, "prj");
        var (system, refusal) = FeatureFile.ReadSystem(() => prj is null ? null : PrjReader.Match(prj, stem + ".prj"));
        var options = new ShapefileReaderOptions
        {
            Encoding = encoding,
            Factory = RegionGeometry.Factory,
            GeometryBuilderMode = GeometryBuilderMode.IgnoreInvalidShapes,
        };
        using var reader = Guard(
            name,
            "its columns",
            () => Shapefile.OpenRead(new MemoryStream(shp), new MemoryStream(dbf), options)
        );
        var fields = reader.Fields.Select(field => field.Name).ToImmutableArray();
        var features = ImmutableArray.CreateBuilder<FileFeature>();
        var deleted = false;
        for (
            var number = 1;
            Guard(name, FormattableString.Invariant($"feature {number}"), () => reader.Read(out deleted));
            number++
        )
        {
            context.Cancellation.ThrowIfCancellationRequested();
            if (!deleted)
            {
                var geometry = reader.Geometry is { IsEmpty: false } shape ? Own(shape) : null;
                features.Add(
                    new FileFeature(number, geometry, [.. reader.Fields.Select(field => TextOf(field.Value))])
                );
            }
        }

        return new FeatureFile(name, fields, features.ToImmutable(), system, refusal);
    }

    /// <summary>Whatever the library throws over a damaged file is told as the damage that it is.</summary>
    private static T Guard<T>(string name, string item, Func<T> read)
    {
        try
        {
            return read();
        }
        catch (Exception failure) when (failure is not OutOfMemoryException)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0217",
                    new Place(name, Item: item),
                    $"This cannot be read: {failure.Message}",
                    "Copy all files of the shapefile again from where they came."
                )
            );
        }
    }

    /// <summary>A copy that the reader does not write over, its rings put together by what lies in what.</summary>
    private static Geometry Own(Geometry shape) =>
        shape is Polygon or MultiPolygon ? RingNesting.Assemble(RingNesting.RingsOf(shape.Copy())) : shape.Copy();

    private static string TextOf(object? value) =>
        value switch
        {
            null => "",
            string text => text.Trim(),
            double number => number.ToString("R", CultureInfo.InvariantCulture),
            IFormattable other => other.ToString(null, CultureInfo.InvariantCulture),
            _ => value.ToString() ?? "",
        };

    private static string Sibling(StepContext context, string stem, string ending, string name) =>
        Found(context, stem, ending)
        ?? throw new RefusedException(
            Finding.Error(
                "RR0210",
                new Place(name),
                $"The shapefile lacks its .{ending} file.",
                $"A shapefile is at least three files; copy {stem}.{ending} beside it."
            )
        );

    private static string? TextOf(StepContext context, string stem, string ending) =>
        Found(context, stem, ending) is { } sibling ? Encoding.UTF8.GetString(ReadAll(context, sibling)) : null;

    private static string? Found(StepContext context, string stem, string ending)
    {
        string[] names = [$"{stem}.{ending}", $"{stem}.{ending.ToUpperInvariant()}"];
        return names.FirstOrDefault(context.InputExists);
    }

    private static byte[] ReadAll(StepContext context, string name)
    {
        using var stream = context.OpenInput(name);
        var bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        return bytes;
    }
}
