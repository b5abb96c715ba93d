using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Steps.Reading.Texts;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Reading;

/// <summary>Reads a gauge list from CSV, or the points of a shapefile or GeoJSON file.</summary>
/// <param name="File">The file, relative to the data folder.</param>
/// <param name="Id">The column that holds each gauge's unique id, by which records name it.</param>
/// <param name="X">For CSV: the column of eastings or longitudes.</param>
/// <param name="Y">For CSV: the column of northings or latitudes.</param>
/// <param name="Elevation">The column of heights above sea level in metres, where wanted.</param>
/// <param name="Crs">The reference system; a CSV file never says it.</param>
/// <example><code>var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326"));</code></example>
[Step("Read gauges")]
public sealed record ReadGaugesStep(
    string File,
    string Id,
    string? X,
    string? Y,
    string? Elevation,
    ReferenceSystem? Crs
) : Step<GaugeNetwork>
{
    /// <inheritdoc/>
    public override GaugeNetwork Execute(StepContext context)
    {
        var ending = TextInput.EndingOf(File);
        var rows = ending is ".csv" or ".txt" or ".tsv"
            ? GaugeRows.OfTable(context, this)
            : GaugeRows.OfLayer(context, this);
        if (rows.Rows.IsEmpty)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0243",
                    new Place(File),
                    "It holds no gauges.",
                    "Give a file with a row or point a gauge."
                )
            );
        }

        var problems = new Problems();
        RequireIds(rows, problems);
        var places = rows.Rows.Select(row => Coordinates(row, problems)).ToArray();
        problems.ThrowIfAny();
        var extent = Bounds.Of(places);
        var system = rows.Layer?.SystemOr(Crs) ?? Crs ?? throw MissingSystem.Refusal(File, extent);
        var gauges = rows.Rows.Zip(places, (row, place) => GaugeOf(row, place, system, problems)).ToImmutableArray();
        problems.ThrowIfAny();
        return new GaugeNetwork(gauges, system, File);
    }

    private static void RequireIds(GaugeRows rows, Problems problems)
    {
        foreach (var blank in rows.Rows.Where(row => row.Id.Length == 0))
        {
            problems.Add("RR0244", blank.Place, "The gauge has no id.", "Give each gauge an id.");
        }

        foreach (
            var twins in rows
                .Rows.Where(row => row.Id.Length > 0)
                .GroupBy(row => row.Id, StringComparer.Ordinal)
                .Where(group => group.Skip(1).Any())
        )
        {
            var first = twins.First().Place;
            foreach (var twin in twins.Skip(1))
            {
                problems.Add(
                    "RR0245",
                    twin.Place with
                    {
                        Item = $"gauge {twins.Key}",
                    },
                    $"This id stands at {first} already.",
                    "Ids are unique: take one of the rows out, or correct its id."
                );
            }
        }
    }

    private static Location Coordinates(GaugeRow row, Problems problems)
    {
        var x = Number(row, row.X, row.XColumn, "x", problems);
        var y = Number(row, row.Y, row.YColumn, "y", problems);
        return new Location(x, y);
    }

    private static double Number(GaugeRow row, string text, int column, string what, Problems problems)
    {
        if (NumberText.TryRead(text, out var number))
        {
            return number;
        }

        var found = text.Length == 0 ? "is blank" : $"is '{text}', which is not a number";
        problems.Add(
            "RR0246",
            row.Place with
            {
                Column = column,
                Item = $"gauge {row.Id}",
            },
            $"Its {what} {found}.",
            NumberText.Mend(text)
        );
        return 0;
    }

    private static Gauge GaugeOf(GaugeRow row, Location place, ReferenceSystem system, Problems problems)
    {
        if (!NativeUnits.IsPossible(place.X, place.Y, system, row.Place with { Item = $"gauge {row.Id}" }, problems))
        {
            return new Gauge(row.Id, place);
        }

        double? elevation =
            row.Elevation.Length == 0 ? null : Number(row, row.Elevation, row.ElevationColumn, "elevation", problems);
        return new Gauge(row.Id, ToModel(place, system), elevation);
    }

    private static Location ToModel(Location place, ReferenceSystem system) =>
        system.Kind == ReferenceSystemKind.Projected
            ? new Location(Lattice.Snap(place.X * system.MetresPerUnit), Lattice.Snap(place.Y * system.MetresPerUnit))
            : place;
}
