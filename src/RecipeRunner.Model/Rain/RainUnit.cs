using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Rain;

/// <summary>The unit of depth or intensity in which a file holds rain. Inside a study all are depths in millimetres.</summary>
public sealed record RainUnit : ISettingValue
{
    private RainUnit(string name, double multiplier, double divisor, bool isIntensity = false)
    {
        Name = name;
        Multiplier = multiplier;
        Divisor = divisor;
        IsIntensity = isIntensity;
    }

    /// <summary>Millimetres.</summary>
    public static RainUnit Millimetres { get; } = new("mm", 1, 1);

    /// <summary>Tenths of a millimetre.</summary>
    public static RainUnit TenthsOfMillimetre { get; } = new("tenths of mm", 1, 10);

    /// <summary>Centimetres.</summary>
    public static RainUnit Centimetres { get; } = new("cm", 10, 1);

    /// <summary>Inches of exactly 25.4 mm (international yard and pound agreement, 1959).</summary>
    public static RainUnit Inches { get; } = new("inches", 25.4, 1);

    /// <summary>Hundredths of an inch.</summary>
    public static RainUnit HundredthsOfInch { get; } = new("hundredths of an inch", 25.4, 100);

    /// <summary>Mean intensity over the step in millimetres an hour.</summary>
    public static RainUnit MillimetresPerHour { get; } = new("mm/h", 1, 1, isIntensity: true);

    /// <summary>Mean intensity over the step in inches an hour.</summary>
    public static RainUnit InchesPerHour { get; } = new("inches/h", 25.4, 1, isIntensity: true);

    /// <summary>The unit's name.</summary>
    public string Name { get; }

    /// <summary>True where values are depths an hour and not depths.</summary>
    public bool IsIntensity { get; }

    private double Multiplier { get; }

    private double Divisor { get; }

    /// <summary>
    /// A value in this unit as a depth in millimetres; a whole number of tenths gives the double nearest to the true depth.
    /// </summary>
    /// <param name="value">The depth, or the mean intensity over the step.</param>
    /// <param name="stepHours">The length of the step in hours, by which an intensity becomes a depth.</param>
    public double ToMillimetres(double value, double stepHours) =>
        (IsIntensity ? value * stepHours : value) * Multiplier / Divisor;

    /// <inheritdoc/>
    public string ToSettingText() => Name;

    /// <inheritdoc/>
    public override string ToString() => Name;
}
