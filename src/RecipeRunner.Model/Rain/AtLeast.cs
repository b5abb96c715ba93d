using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Rain;

/// <summary>Thresholds below which a value is withheld rather than guessed.</summary>
public static class AtLeast
{
    /// <summary>A share in percent: of a basin's weight that must report, or of a period's steps that must have a value.</summary>
    /// <param name="percent">0 to 100.</param>
    /// <exception cref="RefusedException">The number is not within 0 to 100.</exception>
    public static ShareRule Percent(double percent) =>
        percent is >= 0 and <= 100
            ? new ShareRule(percent / 100)
            : throw Refusal(
                string.Create(CultureInfo.InvariantCulture, $"{percent} is not a percentage."),
                "Give a number from 0 to 100, such as AtLeast.Percent(60)."
            );

    /// <summary>A number of gauges with weight in the full network that must report.</summary>
    /// <param name="count">1 or more.</param>
    /// <exception cref="RefusedException">The number is less than 1.</exception>
    public static GaugeCountRule Gauges(int count) =>
        count >= 1
            ? new GaugeCountRule(count)
            : throw Refusal(
                string.Create(CultureInfo.InvariantCulture, $"{count} is not a number of gauges."),
                "Give 1 or more, such as AtLeast.Gauges(2)."
            );

    /// <summary>A number of steps of a period that must have a value, such as 28 days of a month.</summary>
    /// <param name="count">1 or more.</param>
    /// <exception cref="RefusedException">The number is less than 1.</exception>
    public static StepCountRule Steps(int count) =>
        count >= 1
            ? new StepCountRule(count)
            : throw Refusal(
                string.Create(CultureInfo.InvariantCulture, $"{count} is not a number of steps."),
                "Give 1 or more, such as AtLeast.Steps(28)."
            );

    private static RefusedException Refusal(string what, string mend) =>
        new(Finding.Error("RR0503", Place.Of("threshold"), what, mend));
}
