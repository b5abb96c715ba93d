using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>What a recipe accepts where coordinates go from one datum to another.</summary>
public sealed record DatumChoice : ISettingValue
{
    private DatumChoice(string text) => Text = text;

    /// <summary>
    /// Only what the registry publishes: nothing within one datum, null transformations with their stated accuracy. All
    /// other pairs are refused. This is what happens where a recipe says nothing.
    /// </summary>
    public static DatumChoice Published { get; } = new("published");

    /// <summary>
    /// Longitudes and latitudes are taken as if they were on the datum of the target, whatever datum they are on. Wrong by
    /// tens to hundreds of metres, which may be less than the records of old gauges; always a caution that says how much.
    /// </summary>
    public static DatumChoice TakeAsIs { get; } = new("take as is");

    private string Text { get; }

    /// <inheritdoc/>
    public string ToSettingText() => Text;

    /// <inheritdoc/>
    public override string ToString() => Text;
}
