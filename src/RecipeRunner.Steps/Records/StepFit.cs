using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Records;

/// <summary>How the steps of records lie within longer ones.</summary>
internal sealed class StepFit
{
    private readonly RainRecords rain;
    private readonly TimeStep from;
    private readonly TimeStep to;

    /// <summary>What is added to a time of the records to have it on the longer steps' clock.</summary>
    private readonly Period shift;

    private StepFit(RainRecords rain, TimeStep to, Period shift)
    {
        this.rain = rain;
        from = rain.Times.Step;
        this.to = to;
        this.shift = shift;
    }

    /// <summary>The fit of records into longer steps.</summary>
    /// <exception cref="RefusedException">They do not fit exactly.</exception>
    public static StepFit Of(RainRecords rain, TimeStep to)
    {
        var fit = new StepFit(rain, to, ShiftOf(rain, to));
        var (first, next) = (fit.LabelOver(0), to.After(fit.LabelOver(0), 1));
        if (to.IntervalOf(first).Hours <= rain.Times.IntervalAt(0).Hours)
        {
            throw fit.Refusal(
                "RR0527",
                "Only longer steps can be summed; a shorter one is not known from a longer one. Days cannot be shifted: for another observation day hours are needed."
            );
        }

        return fit.IsBoundary(to.IntervalOf(first).Start) && fit.IsBoundary(to.IntervalOf(next).Start)
            ? fit
            : throw fit.Refusal("RR0526", "The longer step must begin and end where steps of the records do.");
    }

    /// <summary>The longer steps that the records reach into.</summary>
    public Timeline Timeline()
    {
        var (first, last) = (LabelOver(0), LabelOver(rain.Times.Count - 1));
        return new Timeline(to, first, to.StepsBetween(first, last) + 1);
    }

    /// <summary>The steps of the records within a longer step: the first of them, how many there are and how many there should be.</summary>
    public (int First, int Count, int Expected) StepsOf(LocalDateTime label)
    {
        var start = from.StepsBetween(rain.Times.First, FirstWithin(label));
        var expected = Expected(label);
        var first = Math.Max(0, start);
        var end = Math.Min(rain.Times.Count, start + expected);
        return (first, end - first, expected);
    }

    private LocalDateTime LabelOver(int step)
    {
        if (from.LabelsAreDates)
        {
            return to.LabelOf(rain.Times.DateAt(step).AtMidnight())!.Value;
        }

        var start = rain.Times.IntervalAt(step).Start + shift;
        var label = to.LabelOf(start.Date.AtMidnight())!.Value;
        while (to.IntervalOf(label).Start > start)
        {
            label = to.After(label, -1);
        }

        while (to.IntervalOf(label).End <= start)
        {
            label = to.After(label, 1);
        }

        return label;
    }

    /// <summary>The label of the first step within a longer one.</summary>
    private LocalDateTime FirstWithin(LocalDateTime label)
    {
        if (from.LabelsAreDates)
        {
            return from.LabelOf(to.DateOf(label).AtMidnight())!.Value;
        }

        var start = to.IntervalOf(label).Start - shift;
        return from.IntervalOf(start).Start == start ? start : from.After(start, 1);
    }

    private int Expected(LocalDateTime label) => from.StepsBetween(FirstWithin(label), FirstWithin(to.After(label, 1)));

    private bool IsBoundary(LocalDateTime time) =>
        from.LabelsAreDates
            ? from.LabelOf(time.Date.AtMidnight()) == time.Date.AtMidnight()
            : from.LabelOf(time - shift) is not null;

    private static Period ShiftOf(RainRecords rain, TimeStep to)
    {
        var (own, asked) = (rain.Times.Step.UtcOffset, to.UtcOffset);
        if (asked is null)
        {
            return Period.Zero;
        }

        return own is { } known
            ? Period.FromSeconds(asked.Value.Seconds - known.Seconds)
            : throw new RefusedException(
                Finding.Error(
                    "RR0525",
                    new Place(rain.Source),
                    $"The records are {rain.Times.Step.ToSettingText()} on a clock that is not said, the longer steps {to.ToSettingText()}.",
                    "Say the offset of the records' clock when reading them, such as TimeStep.Hours(utcOffset: \"+00:00\")."
                )
            );
    }

    private RefusedException Refusal(string code, string mend) =>
        new(
            Finding.Error(
                code,
                new Place(rain.Source),
                $"Records of {from.ToSettingText()} cannot be summed over {to.ToSettingText()}.",
                mend
            )
        );
}
