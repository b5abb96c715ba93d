using NodaTime;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>
/// Recognises the traces that a clock with summer time leaves in a record of hours or minutes: where it is set, an early hour
/// of a Sunday is there twice or not at all (common practice, no source).
/// </summary>
internal static class SummerTime
{
    private const int LatestHour = 3;

    /// <summary>What to do about a time that stands twice.</summary>
    public static string DuplicateMend(TimeStep step, LocalDateTime label) =>
        MaySetClock(step, label)
            ? "An early hour of a Sunday twice is what a clock leaves that is set back from summer time. Write the record by one clock all year; if it is not that, take one of the two rows out."
            : "Take one of the two rows out.";

    /// <summary>True where the hour is one at which clocks are set.</summary>
    public static bool MaySetClock(TimeStep step, LocalDateTime label) =>
        !step.LabelsAreDates && label.DayOfWeek == IsoDayOfWeek.Sunday && label.Hour <= LatestHour;
}
