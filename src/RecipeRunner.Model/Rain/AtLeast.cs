using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Rain;

/// <summary>A share below which a value is withheld rather than guessed.</summary>
public sealed record AtLeast : ISettingValue
{
    private AtLeast(double percent) => Share = percent / 100;

    /// <summary>The share, 0 to 1.</summary>
    public double Share { get; }

    /// <summary>A share in percent.</summary>
    /// <param name="percent">0 to 100.</param>
    /// <exception cref="RefusedException">The number is not within 0 to 100.</exception>
    public static AtLeast Percent(double percent) =>
        percent is >= 0 and <= 100
            ? new AtLeast(percent)
            : throw new RefusedException(
                Finding.Error(
                    "RR0503",
                    Place.Of("threshold"),
                    string.Create(CultureInfo.InvariantCulture, $"{percent} is not a percentage."),
                    "Give a number from 0 to 100, such as AtLeast.Percent(60)."
                )
            );

    /// <summary>True where a share reaches the threshold, forgiving the last bits of a sum.</summary>
    /// <param name="share">0 to 1.</param>
    public bool IsMetBy(double share) => share >= Share - 1e-12;

    /// <inheritdoc/>
    public string ToSettingText() =>
        string.Create(CultureInfo.InvariantCulture, $"at least {Share * 100:0.############} %");

    /// <inheritdoc/>
    public override string ToString() => ToSettingText();
}
