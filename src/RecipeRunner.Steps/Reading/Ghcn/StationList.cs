using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>
/// Reads the rows of <c>ghcnd-stations.txt</c> (source: NOAA GHCN-Daily readme.txt, section IV): id 1-11, latitude 13-20,
/// longitude 22-30, elevation 32-37 in metres (-999.9 where not known), then names and flags, which are not needed.
/// </summary>
internal static class StationList
{
    private const int LeastLength = 37;
    private const double UnknownElevation = -999.9;

    /// <summary>Reads the rows of the stations asked for, or of all.</summary>
    /// <exception cref="RefusedException">With every problem found.</exception>
    public static List<Gauge> Read(StepContext context, string file, IReadOnlySet<string>? wanted)
    {
        using var text = TextInput.Open(context, file);
        using var reader = text.Start();
        var (problems, gauges, lines) = (
            new Problems(),
            new List<Gauge>(),
            new Dictionary<string, int>(StringComparer.Ordinal)
        );
        var line = 0;
        while (reader.ReadLine() is { } row)
        {
            line++;
            if (row.AsSpan().Trim().IsEmpty)
            {
                continue;
            }

            if (GaugeOf(row, new Place(file, line), wanted, problems) is { } gauge)
            {
                AddOnce(gauge, new Place(file, line), gauges, lines, problems);
            }
        }

        problems.ThrowIfAny();
        return gauges;
    }

    private static Gauge? GaugeOf(string row, Place place, IReadOnlySet<string>? wanted, Problems problems)
    {
        if (row.Length < LeastLength)
        {
            Add(
                problems,
                place,
                FormattableString.Invariant($"The row has {row.Length} characters; it needs {LeastLength}.")
            );
            return null;
        }

        var id = row[..GhcnLayout.IdLength];
        if (wanted is not null && !wanted.Contains(id))
        {
            return null;
        }

        if (id.Contains(' ', StringComparison.Ordinal))
        {
            Add(problems, place with { Column = 1 }, $"'{id}' is not a station's id.");
            return null;
        }

        if (
            Number(row, 12, 8, -90, 90, "latitude", place, problems) is not { } latitude
            || Number(row, 21, 9, -180, 180, "longitude", place, problems) is not { } longitude
            || Number(row, 31, 6, UnknownElevation, 9000, "elevation", place, problems) is not { } elevation
        )
        {
            return null;
        }

        return new Gauge(id, new Location(longitude, latitude), elevation == UnknownElevation ? null : elevation);
    }

    private static double? Number(
        string row,
        int start,
        int length,
        double least,
        double most,
        string what,
        Place place,
        Problems problems
    )
    {
        var text = row.AsSpan(start, length).Trim();
        if (NumberText.TryRead(text, out var number) && number >= least && number <= most)
        {
            return number;
        }

        Add(problems, place with { Column = start + 1 }, $"'{text}' is not a possible {what}.");
        return null;
    }

    private static void AddOnce(
        Gauge gauge,
        Place place,
        List<Gauge> gauges,
        Dictionary<string, int> lines,
        Problems problems
    )
    {
        if (lines.TryAdd(gauge.Id, place.Line))
        {
            gauges.Add(gauge);
            return;
        }

        problems.Add(
            "RR0245",
            place with
            {
                Item = $"gauge {gauge.Id}",
            },
            $"This id stands at line {lines[gauge.Id].ToString(CultureInfo.InvariantCulture)} already.",
            "Ids are unique: take one of the rows out, or correct its id."
        );
    }

    private static void Add(Problems problems, Place place, string what) =>
        problems.Add(
            "RR0282",
            place,
            what,
            "The file does not follow the format of ghcnd-stations.txt; fetch it again."
        );
}
