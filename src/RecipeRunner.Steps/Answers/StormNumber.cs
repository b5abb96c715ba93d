using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Answers;

/// <summary>Finds a storm by the number that people see.</summary>
internal static class StormNumber
{
    /// <summary>The storm of a number from 1.</summary>
    /// <exception cref="RefusedException">There is no such storm.</exception>
    public static Storm Of(StormList storms, int number) =>
        number >= 1 && number <= storms.Storms.Length
            ? storms.Storms[number - 1]
            : throw new RefusedException(
                Finding.Error(
                    "RR0546",
                    Place.Of("storms"),
                    string.Create(CultureInfo.InvariantCulture, $"There is no storm {number}."),
                    storms.Storms.IsEmpty
                        ? "No storm was found; ask for less depth."
                        : string.Create(
                            CultureInfo.InvariantCulture,
                            $"Storms are numbered 1 to {storms.Storms.Length}."
                        )
                )
            );
}
