using System.Globalization;
using NodaTime;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>
/// Reads the rows of a <c>.dly</c> file: a station, month and element a row, 269 characters wide (source: NOAA GHCN-Daily
/// readme.txt, section III): id 1-11, year 12-15, month 16-17, element 18-21, then 31 times a value of five characters and its
/// measurement, quality and source flags.
/// </summary>
internal static class DlyFile
{
    /// <summary>The length of a row.</summary>
    public const int RowLength = 269;

    private const int FirstValue = 21;
    private const int ValueLength = 5;
    private const int DayLength = 8;
    private const int RowsBetweenReports = 1000;

    /// <summary>Reads all rows.</summary>
    public static void Read(TextInput text, GhcnRows rows, StepContext context)
    {
        using var reader = text.Start();
        var line = 0;
        while (reader.ReadLine() is { } row)
        {
            line++;
            if (row.AsSpan().Trim().Length > 0)
            {
                ReadRow(row, line, rows);
            }

            if (line % RowsBetweenReports == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress(text.Share);
            }
        }
    }

    /// <summary>The value of one day of a row, with its flags.</summary>
    public static FileValue ValueOf(string row, Place place, int day)
    {
        var at = FirstValue + ((day - 1) * DayLength);
        return new FileValue(place with { Column = at + 1 }, row.Substring(at, DayLength));
    }

    private static void ReadRow(string row, int line, GhcnRows rows)
    {
        if (row.Length != RowLength)
        {
            rows.Problems.Add(
                "RR0278",
                new Place(rows.File, line),
                FormattableString.Invariant(
                    $"The row has {row.Length} characters; rows of this format have {RowLength}."
                ),
                "Was the file cut, or were blanks at the ends of lines taken away? Fetch it again."
            );
            return;
        }

        var id = row.AsSpan(0, GhcnLayout.IdLength);
        var element = row.AsSpan(17, 4);
        if (!GhcnLayout.IsRain(element) || !rows.IsWanted(id))
        {
            return;
        }

        if (
            !TryNumber(row.AsSpan(11, 4), out var year)
            || !TryNumber(row.AsSpan(15, 2), out var month)
            || year < 1
            || month is < 1 or > 12
        )
        {
            rows.AddProblem(line, 12, $"'{row.AsSpan(11, 6)}' is not a year and month.");
            return;
        }

        ReadDays(row, new RowHead(line, id, element), (year, month), rows);
    }

    private static void ReadDays(string row, RowHead head, (int Year, int Month) month, GhcnRows rows)
    {
        var length = CalendarSystem.Iso.GetDaysInMonth(month.Year, month.Month);
        for (var day = 1; day <= 31; day++)
        {
            var at = FirstValue + ((day - 1) * DayLength);
            if (!TryNumber(row.AsSpan(at, ValueLength).TrimStart(), out var value))
            {
                rows.AddProblem(head.Line, at + 1, $"'{row.AsSpan(at, ValueLength)}' is not a value.");
            }
            else if (day <= length)
            {
                var read = new GhcnValue(value, row[at + ValueLength], row[at + ValueLength + 1]);
                rows.Add(head.Id, new LocalDate(month.Year, month.Month, day), head.Element, read, (head.Line, at + 1));
            }
            else if (value != GhcnLayout.Missing)
            {
                rows.AddProblem(
                    head.Line,
                    at + 1,
                    FormattableString.Invariant(
                        $"There is a value for day {day} of {month.Year:0000}-{month.Month:00}, which has {length} days."
                    )
                );
            }
        }
    }

    private static bool TryNumber(ReadOnlySpan<char> text, out int number) =>
        int.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out number);

    private readonly ref struct RowHead(int line, ReadOnlySpan<char> id, ReadOnlySpan<char> element)
    {
        public int Line { get; } = line;

        public ReadOnlySpan<char> Id { get; } = id;

        public ReadOnlySpan<char> Element { get; } = element;
    }
}
