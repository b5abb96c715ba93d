namespace RecipeRunner.Model.Steps;

/// <summary>A value that a recipe passes to a step and the journal writes down as text.</summary>
public interface ISettingValue
{
    /// <summary>The value as a person would read it; equal values give equal text, on every machine.</summary>
    string ToSettingText();
}
