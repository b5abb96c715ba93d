using System.Globalization;

namespace RecipeRunner.Model.Wording;

/// <summary>Numbers of things in a sentence: <c>1 value is</c>, <c>1,200 values are</c>.</summary>
public static class Counted
{
    /// <summary>A number of things whose plural ends in s.</summary>
    /// <param name="count">How many.</param>
    /// <param name="one">The word for one.</param>
    public static string Of(long count, string one) => Of(count, one, one + "s");

    /// <summary>A number of things, with words that follow in the same number.</summary>
    /// <param name="count">How many.</param>
    /// <param name="one">The words for one, such as <c>value is</c>.</param>
    /// <param name="many">The words for none or several, such as <c>values are</c>.</param>
    public static string Of(long count, string one, string many) =>
        string.Create(CultureInfo.InvariantCulture, $"{count:N0} {(count == 1 ? one : many)}");

    /// <summary>How often: <c>once</c>, <c>12 times</c>.</summary>
    /// <param name="count">How often.</param>
    public static string Times(long count) => count == 1 ? "once" : Of(count, "time");
}
