using System.Globalization;
using NodaTime;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Points out steps for which files have no row, and those that look like the work of a clock with summer time.</summary>
internal static class RowFindings
{
    private const int MostListed = 5;

    /// <summary>Adds the findings.</summary>
    public static void Tell(StepContext context, RecordPart part)
    {
        var absent = Enumerable.Range(0, part.Times.Count).Where(step => !part.Lines.HasRow(step)).ToArray();
        var dates = absent
            .Where(step => SummerTime.MaySetClock(part.Times.Step, part.Times.LabelAt(step)))
            .GroupBy(step => part.Times.LabelAt(step).Date)
            .Where(steps => steps.Sum(step => part.Times.IntervalAt(step).Hours) == 1)
            .Select(steps => steps.Key)
            .ToArray();
        TellOfAbsent(context, part, absent);
        TellOfClock(context, part, dates);
    }

    private static void TellOfAbsent(StepContext context, RecordPart part, int[] absent)
    {
        if (absent.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0258",
                    new Place(part.File),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{Counted.Of(absent.Length, "step has", "steps have")} no row, the first {part.Times.TextAt(absent[0])}; all gauges count as missing there."
                    ),
                    "Check whether rows were lost."
                )
            );
        }
    }

    private static void TellOfClock(StepContext context, RecordPart part, LocalDate[] dates)
    {
        if (dates.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0277",
                    new Place(part.File),
                    $"An early hour of a Sunday has no row on {string.Join(", ", dates.Take(MostListed).Select(date => date.ToString("uuuu-MM-dd", CultureInfo.InvariantCulture)))}{(dates.Length > MostListed ? " and others" : "")}: a clock that is set to summer time leaves such holes.",
                    "If so, half the year is an hour off: write the record by one clock all year."
                )
            );
        }
    }
}
