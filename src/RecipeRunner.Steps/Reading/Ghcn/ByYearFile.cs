using System.Globalization;
using nietras.SeparatedValues;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Records;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>
/// Reads the rows of a by-year or by-station file, a value a row without a header (source: NOAA GHCN-Daily readme-by_year.txt,
/// readme-by_station.txt): id, date as YYYYMMDD, element, value, measurement flag, quality flag, source flag, time of
/// observation as HHMM.
/// </summary>
internal static class ByYearFile
{
    private const int Columns = 8;
    private const int RowsBetweenReports = 10_000;

    /// <summary>Reads all rows.</summary>
    public static void Read(TextInput text, GhcnRows rows, ObservationTimes times, StepContext context)
    {
        using var reader = CsvText.Open(text);
        var count = 0;
        foreach (var row in reader)
        {
            if (!CsvText.IsBlank(row))
            {
                ReadRow(row, rows, times);
            }

            if (++count % RowsBetweenReports == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress(text.Share);
            }
        }
    }

    private static void ReadRow(SepReader.Row row, GhcnRows rows, ObservationTimes times)
    {
        var line = CsvText.LineOf(row);
        if (row.ColCount != Columns)
        {
            rows.Problems.Add(
                "RR0278",
                new Place(rows.File, line),
                FormattableString.Invariant($"The row has {row.ColCount} cells; rows of this format have {Columns}."),
                "Was the file cut? Fetch it again."
            );
            return;
        }

        var id = row[0].Span;
        var element = row[2].Span;
        if (id.Length != GhcnLayout.IdLength)
        {
            rows.AddProblem(line, 1, $"'{id}' is not a station's id, which has {GhcnLayout.IdLength} characters.");
            return;
        }

        if (GhcnLayout.IsRain(element) && rows.IsWanted(id))
        {
            ReadValue(row, id, element, rows, times);
        }
    }

    private static void ReadValue(
        SepReader.Row row,
        ReadOnlySpan<char> id,
        ReadOnlySpan<char> element,
        GhcnRows rows,
        ObservationTimes times
    )
    {
        var line = CsvText.LineOf(row);
        if (row[1].Span.Length != 8 || !TimeText.TryRead(row[1].Span, out var date) || date.Detail != TimeDetail.Date)
        {
            rows.AddProblem(line, 2, $"'{row[1].Span}' is not a date such as 20240131.");
            return;
        }

        if (
            !int.TryParse(
                row[3].Span.Trim(),
                NumberStyles.AllowLeadingSign,
                CultureInfo.InvariantCulture,
                out var value
            )
        )
        {
            rows.AddProblem(line, 4, $"'{row[3].Span}' is not a value.");
            return;
        }

        if (row[4].Span.Length > 1 || row[5].Span.Length > 1)
        {
            rows.AddProblem(line, 5, $"'{row[4].Span},{row[5].Span}' are not flags of one letter.");
            return;
        }

        var read = new GhcnValue(value, FlagOf(row[4].Span), FlagOf(row[5].Span));
        rows.Add(id, date.Time.Date, element, read, (line, 4));
        if (!row[7].Span.Trim().IsEmpty)
        {
            times.Add(id, row[7].Span.Trim());
        }
    }

    private static char FlagOf(ReadOnlySpan<char> text) => text.IsEmpty ? GhcnLayout.Blank : text[0];
}
