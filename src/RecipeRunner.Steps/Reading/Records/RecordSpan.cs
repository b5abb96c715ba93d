using System.Globalization;
using NodaTime;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>
/// The time over which a file's rows lie, as they come in any order: counts steps from the first row's label, and refuses
/// spans that only a mistyped time explains.
/// </summary>
internal sealed class RecordSpan(string file, TimeStep step)
{
    private const int LongestYears = 400;
    private const long MostValues = 1L << 30;

    private LocalDateTime origin;
    private (LocalDateTime Label, int Line) first;
    private (LocalDateTime Label, int Line) last;

    /// <summary>True once a row was taken in.</summary>
    public bool HasRows { get; private set; }

    /// <summary>Steps from the first row to the earliest, 0 or less.</summary>
    public int Lowest { get; private set; }

    /// <summary>Steps from the first row to the latest, 0 or more.</summary>
    public int Highest { get; private set; }

    /// <summary>How many steps lie between the earliest and latest row, both included.</summary>
    public int Count => Highest - Lowest + 1;

    /// <summary>Every step from the earliest to the latest row.</summary>
    public Timeline Times => new(step, first.Label, Count);

    /// <summary>Steps from the first row's label to this one; null where the span would be absurd.</summary>
    public int? Offset(LocalDateTime label, int line, int gauges, Problems problems)
    {
        if (!HasRows)
        {
            (origin, first, last, HasRows) = (label, (label, line), (label, line), true);
            return 0;
        }

        (LocalDateTime Label, int Line) here = (label, line);
        var earliest = label < first.Label ? here : first;
        var latest = label > last.Label ? here : last;
        if (latest.Label.Year - earliest.Label.Year > LongestYears)
        {
            AddAbsurd("RR0259", FormattableString.Invariant($"{LongestYears} years"), earliest, latest, line, problems);
            return null;
        }

        var offset = step.StepsBetween(origin, label);
        var (lowest, highest) = (Math.Min(Lowest, offset), Math.Max(Highest, offset));
        if ((highest - lowest + 1L) * gauges > MostValues)
        {
            AddAbsurd(
                "RR0266",
                FormattableString.Invariant($"{MostValues:N0} values"),
                earliest,
                latest,
                line,
                problems
            );
            return null;
        }

        (first, last, Lowest, Highest) = (earliest, latest, lowest, highest);
        return offset;
    }

    /// <summary>Refuses a file without rows.</summary>
    /// <exception cref="RefusedException">There was no row.</exception>
    public void RequireRows()
    {
        if (!HasRows)
        {
            throw new RefusedException(
                Finding.Error("RR0256", new Place(file), "It has a header but no rows.", "Was the file cut?")
            );
        }
    }

    /// <summary>Refuses a span and number of gauges that together are too many to hold.</summary>
    /// <exception cref="RefusedException">They are.</exception>
    public static void RequireRoom(string source, Timeline times, int gauges)
    {
        if ((long)times.Count * gauges > MostValues)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0266",
                    new Place(source),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{gauges:N0} gauges from {times} are more than {MostValues:N0} values."
                    ),
                    "Look for a year that was mistyped, or read fewer gauges or years at once."
                )
            );
        }
    }

    private void AddAbsurd(
        string code,
        string most,
        (LocalDateTime Label, int Line) earliest,
        (LocalDateTime Label, int Line) latest,
        int line,
        Problems problems
    ) =>
        problems.Add(
            code,
            new Place(file, line),
            FormattableString.Invariant(
                $"Its times run from {step.LabelText(earliest.Label)} (line {earliest.Line}) to {step.LabelText(latest.Label)} (line {latest.Line}), more than {most}."
            ),
            "Look for a year that was mistyped."
        );
}
