using NodaTime;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Series;

/// <summary>The steps of a record that fall into one period.</summary>
/// <param name="Start">The first date of the period.</param>
/// <param name="FirstStep">Index of its first step in the record.</param>
/// <param name="Count">How many of its steps the record has; they follow one another.</param>
/// <param name="Expected">How many steps the period has by the calendar.</param>
internal readonly record struct StepsOfPeriod(LocalDate Start, int FirstStep, int Count, int Expected);

/// <summary>Groups the steps of a record into periods: a step belongs to the period that holds its date.</summary>
internal static class Periods
{
    /// <summary>The periods that the record reaches into, in order.</summary>
    /// <exception cref="RefusedException">The steps are longer than the periods.</exception>
    public static StepsOfPeriod[] Of(Timeline times, Every period)
    {
        var found = new List<StepsOfPeriod>();
        for (var t = 0; t < times.Count; )
        {
            var start = period.StartOf(times.DateAt(t), times.DateAt(0));
            var next = t + 1;
            while (next < times.Count && period.StartOf(times.DateAt(next), times.DateAt(0)) == start)
            {
                next++;
            }

            found.Add(new StepsOfPeriod(start, t, next - t, Expected(times, period, start)));
            t = next;
        }

        return [.. found];
    }

    private static int Expected(Timeline times, Every period, LocalDate start)
    {
        if (period == Every.WholeRecord)
        {
            return times.Count;
        }

        var end = period.EndOf(start, start);
        var step = times.Step;
        var (first, last) = (step.LabelOf(start.AtMidnight())!.Value, step.LabelOf(end.AtMidnight())!.Value);
        var count = step.StepsBetween(first, last);
        var fits = first.Date == start && last.Date == end;
        return fits && count >= 1
            ? count
            : throw new RefusedException(
                Finding.Error(
                    "RR0523",
                    Place.Of("period"),
                    $"Steps of {step.ToSettingText()} do not fit into {period.ToSettingText()}.",
                    "Sum over a longer period."
                )
            );
    }
}
