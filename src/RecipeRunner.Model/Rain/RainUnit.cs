using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Rain;

/// <summary>The unit of depth in which a file holds rain. Inside a study all depths are millimetres.</summary>
public sealed record RainUnit : ISettingValue
{
    private RainUnit(string name, double multiplier, double divisor)
    {
        Name = name;
        Multiplier = multiplier;
        Divisor = divisor;
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

    /// <summary>The unit's name.</summary>
    public string Name { get; }

    private double Multiplier { get; }

    private double Divisor { get; }

    /// <summary>A depth in this unit as millimetres; a whole number of tenths gives the double nearest to the true depth.</summary>
    /// <param name="depth">The depth in this unit.</param>
    public double ToMillimetres(double depth) => depth * Multiplier / Divisor;

    /// <inheritdoc/>
    public string ToSettingText() => Name;

    /// <inheritdoc/>
    public override string ToString() => Name;
}
