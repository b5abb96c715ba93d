using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Rain;

/// <summary>Distances beyond which a gauge does not speak for a basin.</summary>
public static class Within
{
    /// <summary>The distance from a basin (0 inside) within which some gauge must report.</summary>
    /// <param name="kilometres">0 or more.</param>
    /// <exception cref="RefusedException">The number is less than 0, or not a number.</exception>
    public static DistanceRule Kilometres(double kilometres) =>
        kilometres is >= 0 and < double.PositiveInfinity
            ? new DistanceRule(kilometres * 1000)
            : throw new RefusedException(
                Finding.Error(
                    "RR0503",
                    Place.Of("threshold"),
                    string.Create(CultureInfo.InvariantCulture, $"{kilometres} is not a distance."),
                    "Give 0 or more, such as Within.Kilometres(30)."
                )
            );
}
