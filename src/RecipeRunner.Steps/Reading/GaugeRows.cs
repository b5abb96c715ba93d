using System.Collections.Immutable;
using NetTopologySuite.Geometries;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading;

/// <summary>A gauge as its file holds it: the place where it stands in the file, and its cells as text.</summary>
internal sealed record GaugeRow(
    Place Place,
    string Id,
    string X,
    string Y,
    string Elevation,
    int XColumn,
    int YColumn,
    int ElevationColumn
);

/// <summary>Gauge rows of a text table, or of the points of a layer file.</summary>
/// <param name="Rows">The rows.</param>
/// <param name="Layer">The layer file; null for a text table, which says no reference system.</param>
internal sealed record GaugeRows(ImmutableArray<GaugeRow> Rows, FeatureFile? Layer)
{
    /// <summary>Reads the rows of a text table.</summary>
    public static GaugeRows OfTable(StepContext context, ReadGaugesStep step)
    {
        using var text = TextInput.Open(context, step.File);
        using var reader = CsvText.Open(text);
        var names = CsvText.Names(reader, step.File);
        if (step.X is null || step.Y is null)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0240",
                    new Place(step.File),
                    "The recipe does not say which columns hold the coordinates.",
                    $"Add x: and y: with column names. Its columns are {string.Join(", ", names)}."
                )
            );
        }

        var id = FieldNames.Find(step.File, names, step.Id);
        var x = FieldNames.Find(step.File, names, step.X);
        var y = FieldNames.Find(step.File, names, step.Y);
        var elevation = step.Elevation is null ? -1 : FieldNames.Find(step.File, names, step.Elevation);
        var problems = new Problems();
        var rows = ImmutableArray.CreateBuilder<GaugeRow>();
        foreach (var row in reader)
        {
            var place = new Place(step.File, CsvText.LineOf(row));
            if (CsvText.IsBlank(row))
            {
                continue;
            }

            if (!CsvText.Fits(row, names.Length))
            {
                problems.Add(
                    "RR0241",
                    place,
                    FormattableString.Invariant($"It has {row.ColCount} cells; the header has {names.Length}."),
                    "A cell that holds the separator stands in quotes."
                );
                continue;
            }

            rows.Add(
                new GaugeRow(
                    place,
                    row[id].ToString().Trim(),
                    row[x].ToString().Trim(),
                    row[y].ToString().Trim(),
                    elevation < 0 ? "" : row[elevation].ToString().Trim(),
                    x + 1,
                    y + 1,
                    elevation + 1
                )
            );
        }

        problems.ThrowIfAny();
        return new GaugeRows(rows.ToImmutable(), null);
    }

    /// <summary>Reads the points of a shapefile or GeoJSON file.</summary>
    public static GaugeRows OfLayer(StepContext context, ReadGaugesStep step)
    {
        var file = FeatureFile.Read(context, step.File);
        var id = file.FieldOf(step.Id);
        var elevation = step.Elevation is null ? -1 : file.FieldOf(step.Elevation);
        var problems = new Problems();
        var rows = file
            .Features.Select(feature => OfFeature(feature, step, id, elevation, problems))
            .OfType<GaugeRow>()
            .ToImmutableArray();
        problems.ThrowIfAny();
        return new GaugeRows(rows, file);
    }

    private static GaugeRow? OfFeature(
        FileFeature feature,
        ReadGaugesStep step,
        int id,
        int elevation,
        Problems problems
    )
    {
        var place = new Place(step.File, Item: FormattableString.Invariant($"feature {feature.Number}"));
        if (feature.Geometry is not Point { IsEmpty: false } point)
        {
            problems.Add(
                "RR0242",
                place,
                $"Its geometry is {feature.Geometry?.GeometryType ?? "absent"}, not a point.",
                "Gauges are points; give a point layer."
            );
            return null;
        }

        return new GaugeRow(
            place,
            feature.Values[id],
            FormattableString.Invariant($"{point.X:R}"),
            FormattableString.Invariant($"{point.Y:R}"),
            elevation < 0 ? "" : feature.Values[elevation],
            0,
            0,
            0
        );
    }
}
