using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>Reads one GHCN-Daily file of either form, told apart by its first row.</summary>
internal static class GhcnFile
{
    private const int LeastLength = 21;

    /// <summary>Reads a file.</summary>
    /// <param name="context">Opens the file.</param>
    /// <param name="name">The file.</param>
    /// <param name="step">The days.</param>
    /// <param name="wanted">The stations to take; null for all.</param>
    /// <param name="times">Takes times of observation.</param>
    /// <returns>What it holds, empty where it has nothing of the stations asked for; and its form in words.</returns>
    /// <exception cref="RefusedException">With every problem found.</exception>
    public static (GhcnRows Rows, string Form) Read(
        StepContext context,
        string name,
        TimeStep step,
        IReadOnlySet<string>? wanted,
        ObservationTimes times
    )
    {
        using var text = TextInput.Open(context, name);
        var rows = new GhcnRows(name, step, wanted);
        var isFixed = IsFixedWidth(text);
        if (isFixed)
        {
            DlyFile.Read(text, rows, context);
        }
        else
        {
            ByYearFile.Read(text, rows, times, context);
        }

        rows.Problems.ThrowIfAny();
        return (rows, isFixed ? "GHCN-Daily, .dly" : "GHCN-Daily, a value a row");
    }

    /// <summary>The value that stands on a line, with its flags.</summary>
    /// <param name="context">Opens the file.</param>
    /// <param name="name">The file.</param>
    /// <param name="line">Its line.</param>
    /// <param name="day">The day of the month, which tells the column of the fixed-width form.</param>
    public static FileValue ValueAt(StepContext context, string name, int line, int day)
    {
        using var text = TextInput.Open(context, name);
        if (!IsFixedWidth(text))
        {
            return SourceCell.At(context, name, line, column: 3);
        }

        using var reader = text.Start();
        for (var before = 1; before < line; before++)
        {
            reader.ReadLine();
        }

        return DlyFile.ValueOf(reader.ReadLine()!, new Place(name, line), day);
    }

    /// <summary>True where the first row is of one of the two forms.</summary>
    public static bool LooksLike(TextInput text) => FormOf(FirstRow(text)) is not null;

    /// <summary>True for the fixed-width form.</summary>
    /// <exception cref="RefusedException">The first row is of neither form.</exception>
    private static bool IsFixedWidth(TextInput text)
    {
        if (text.Lines == 0)
        {
            throw CsvText.Empty(text.Name);
        }

        var row = FirstRow(text);
        return FormOf(row)
            ?? throw new RefusedException(
                Finding.Error(
                    "RR0285",
                    new Place(text.Name, 1),
                    $"The row '{(row.Length <= 40 ? row : row[..40] + "…")}' is of neither form of GHCN-Daily.",
                    "Give a .dly file, or a by-year or by-station .csv file, as NOAA gives them out; other tables are read with ReadRecords."
                )
            );
    }

    private static string FirstRow(TextInput text)
    {
        using var reader = text.Start();
        return reader.ReadLine() ?? "";
    }

    /// <summary>True for the fixed-width form, whose id is followed by a year, false for a value a row, whose id is followed by a comma; null for neither.</summary>
    private static bool? FormOf(string row) =>
        row.Length < LeastLength || row.AsSpan(0, GhcnLayout.IdLength).ContainsAny(',', ' ', ';') ? null
        : row[GhcnLayout.IdLength] == ','
            ? AreDigits(row.AsSpan(GhcnLayout.IdLength + 1, 8)) ? false
                : null
        : AreDigits(row.AsSpan(GhcnLayout.IdLength, 6)) ? true
        : null;

    private static bool AreDigits(ReadOnlySpan<char> text) => text.IndexOfAnyExceptInRange('0', '9') < 0;
}
