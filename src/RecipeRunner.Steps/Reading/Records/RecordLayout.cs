using System.Collections.Immutable;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>The columns of one file, found from its first rows and the form that the recipe gives.</summary>
/// <param name="Kind">The form.</param>
/// <param name="HasHeader">True where the first row names columns.</param>
/// <param name="Width">How many cells a row has.</param>
/// <param name="Time">Columns of the time, from 0.</param>
internal sealed record RecordLayout(RecordFormKind Kind, bool HasHeader, int Width, int[] Time)
{
    /// <summary>Of a wide file: the gauges, and the column of each from 0.</summary>
    public (string Id, int Column)[] Gauges { get; init; } = [];

    /// <summary>Of a long file: the column of the gauge's id.</summary>
    public int Gauge { get; init; } = -1;

    /// <summary>The column of the value.</summary>
    public int Value { get; init; } = -1;

    /// <summary>The column of the number of steps; -1 for none.</summary>
    public int Over { get; init; } = -1;

    /// <summary>The column of marks; -1 for none.</summary>
    public int Flag { get; init; } = -1;

    /// <summary>The column of a gauge's values, from 0.</summary>
    public int ColumnOf(string gauge) =>
        Kind == RecordFormKind.Wide
            ? Array.Find(Gauges, known => string.Equals(known.Id, gauge, StringComparison.Ordinal)).Column
            : Value;

    /// <summary>The form in words.</summary>
    public string Words =>
        Kind switch
        {
            RecordFormKind.Wide => "wide: time, then a column a gauge",
            RecordFormKind.Long => "long: gauge, time, value",
            _ => "one gauge: time, value",
        };

    /// <summary>The layout that the recipe's form gives a file.</summary>
    /// <param name="form">The form.</param>
    /// <param name="first">The cells of the first row.</param>
    /// <param name="file">The file.</param>
    /// <param name="labels">Reads times.</param>
    /// <exception cref="RefusedException">The form does not fit the file.</exception>
    public static RecordLayout Of(RecordForm form, string[] first, string file, LabelReader labels)
    {
        var byName = form.Time.Columns.Any(column => column.Number == 0);
        if (
            form.Time.Columns.Any(column =>
                column.Number == 0 && !first.Contains(column.Name, StringComparer.OrdinalIgnoreCase)
            )
        )
        {
            RequireHeader(first, file, labels);
        }

        var time = form.Time.Columns.Select(new ColumnFinder(file, first).Find).ToArray();
        if (time.Length is 0 or > TimeCells.MostColumns)
        {
            throw Misfit(
                file,
                "The form names no column of time, or more than five.",
                "Give year, month, day, hour, minute at most."
            );
        }

        var hasHeader = byName || !labels.LooksLikeTime(TimeCells.Of(first, time));
        first = hasHeader ? CsvText.WithoutEmptyEnd(first) : first;
        var columns = new ColumnFinder(file, first);
        var layout = new RecordLayout(form.Kind, hasHeader, first.Length, time);
        return form.Kind == RecordFormKind.Wide
            ? layout with
            {
                Gauges = hasHeader
                    ? Named(form.Gauges, first, time, columns, file)
                    : Given(form.Gauges, first.Length, time, file),
            }
            : layout with
            {
                Gauge = form.Gauge is { } gauge ? columns.Find(gauge) : -1,
                Value = columns.Find(form.Value!),
                Over = form.Over is { } over ? columns.Find(over) : -1,
                Flag = form.Flag is { } flag ? columns.Find(flag) : -1,
            };
    }

    /// <summary>The layout of a file with a header, found from its first row of values: long where it has three columns with the time in the second, else wide.</summary>
    /// <param name="names">The header.</param>
    /// <param name="cells">The first row after it.</param>
    /// <param name="place">The row.</param>
    /// <param name="labels">Reads times.</param>
    /// <exception cref="RefusedException">The file is of neither form.</exception>
    public static RecordLayout Found(string[] names, string[] cells, Place place, LabelReader labels)
    {
        CsvText.RequireDistinct(names, place.File);
        if (names.Length == 3 && cells.Length >= 2 && labels.LooksLikeTime(cells[1]))
        {
            RequireOneTime(cells, place, labels);
            return new RecordLayout(RecordFormKind.Long, HasHeader: true, 3, [1]) { Gauge = 0, Value = 2 };
        }

        if (names.Length >= 2 && cells.Length >= 1 && labels.LooksLikeTime(cells[0]))
        {
            return new RecordLayout(RecordFormKind.Wide, HasHeader: true, names.Length, [0])
            {
                Gauges = Named([], names, [0], new ColumnFinder(place.File, names), place.File),
            };
        }

        var text = string.Join(",", cells);
        throw new RefusedException(
            Finding.Error(
                "RR0254",
                place,
                $"The row '{(text.Length <= 60 ? text : text[..60] + "…")}' fits neither form of record.",
                "A wide file has the time first (2024-01-31), then a column a gauge; a long file has gauge, time, value. Columns in another order: add   form: RecordForm.Long(gauge: \"…\", time: \"…\", value: \"…\")"
            )
        );
    }

    /// <summary>Refuses a file whose first row holds values already, where no form names its columns.</summary>
    /// <exception cref="RefusedException">It does.</exception>
    public static void RequireHeader(string[] first, string file, LabelReader labels)
    {
        var time = Array.FindIndex(first, 0, Math.Min(2, first.Length), cell => labels.LooksLikeTime(cell));
        if (time >= 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0264",
                    new Place(file, 1, time + 1),
                    $"The file has no header: its first row holds the time '{first[time]}' already.",
                    time == 0
                        ? "Say which columns hold what, by number:   form: RecordForm.Wide(time: 1, gauges: [\"A\", \"B\"])   or   form: RecordForm.OneGauge(time: 1, value: 2)"
                        : "Say which columns hold what, by number:   form: RecordForm.Long(gauge: 1, time: 2, value: 3)"
                )
            );
        }
    }

    /// <summary>Refuses a row whose first two cells may both be the year: a depth or a gauge's id may look like one.</summary>
    private static void RequireOneTime(string[] cells, Place place, LabelReader labels)
    {
        if (labels.LooksLikeTime(cells[0]))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0254",
                    place,
                    $"Both '{cells[0]}' and '{cells[1]}' may be its time, so that the form of the record cannot be told.",
                    "Add   form: RecordForm.Wide(time: \"…\")   or   form: RecordForm.Long(gauge: \"…\", time: \"…\", value: \"…\")"
                )
            );
        }
    }

    /// <summary>The gauges that a header names: those asked for, or all but the time.</summary>
    private static (string Id, int Column)[] Named(
        ImmutableArray<string> wanted,
        string[] names,
        int[] time,
        ColumnFinder columns,
        string file
    )
    {
        var problems = new Problems();
        var found = wanted.IsEmpty
            ? Enumerable.Range(0, names.Length).Except(time).ToArray()
            : wanted.Select(id => columns.Find(id)).ToArray();
        foreach (var column in found.Where(column => names[column].Length == 0))
        {
            problems.Add(
                "RR0244",
                new Place(file, 1, column + 1),
                "The header does not name this gauge.",
                "Write the gauge's id at the head of its column, or take an empty last column away."
            );
        }

        problems.ThrowIfAny();
        if (found.Length == 0 || found.Distinct().Count() < found.Length)
        {
            throw Misfit(file, "The form names no gauge, or one twice.", $"Its columns are {Listing.Of(names)}.");
        }

        CsvText.RequireDistinct([.. found.Select(column => names[column])], file);
        return [.. found.Select(column => (names[column], column))];
    }

    /// <summary>The gauges of a file without header: as given, for the columns that are not the time's.</summary>
    private static (string Id, int Column)[] Given(ImmutableArray<string> ids, int width, int[] time, string file)
    {
        var columns = Enumerable.Range(0, width).Except(time).ToArray();
        if (columns.Length != ids.Length || ids.IsEmpty)
        {
            throw Misfit(
                file,
                FormattableString.Invariant(
                    $"The file has no header and {columns.Length} columns beside the time; the form gives {ids.Length} gauges."
                ),
                "Give the ids of all columns in order:   form: RecordForm.Wide(time: 1, gauges: [\"A\", \"B\"])"
            );
        }

        CsvText.RequireDistinct([.. ids], file);
        return [.. ids.Zip(columns)];
    }

    private static RefusedException Misfit(string file, string what, string mend) =>
        new(Finding.Error("RR0265", new Place(file), what, mend));
}
