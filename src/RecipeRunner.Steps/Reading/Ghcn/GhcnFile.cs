using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>Reads one GHCN-Daily file of either form, told apart by its first row.</summary>
internal static class GhcnFile
{
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

    /// <summary>True for the fixed-width form: no comma where the id ends.</summary>
    /// <exception cref="RefusedException">The first row is of neither form.</exception>
    private static bool IsFixedWidth(TextInput text)
    {
        if (text.Lines == 0)
        {
            throw CsvText.Empty(text.Name);
        }

        using var reader = new StreamReader(text.Start(), leaveOpen: true);
        var row = reader.ReadLine() ?? "";
        var isId = row.Length > GhcnLayout.IdLength && row.AsSpan(0, GhcnLayout.IdLength).IndexOfAny(',', ' ') < 0;
        if (isId && row[GhcnLayout.IdLength] == ',')
        {
            return false;
        }

        return isId && char.IsAsciiDigit(row[GhcnLayout.IdLength])
            ? true
            : throw new RefusedException(
                Finding.Error(
                    "RR0285",
                    new Place(text.Name, 1),
                    $"The row '{(row.Length <= 40 ? row : row[..40] + "…")}' is of neither form of GHCN-Daily.",
                    "Give a .dly file, or a by-year or by-station .csv file, as NOAA gives them out; other tables are read with ReadRecords."
                )
            );
    }
}
