namespace RecipeRunner.Host.Rerunning;

/// <summary>A value of an emitted file.</summary>
/// <param name="Row">The row or feature, so named that a person finds it.</param>
/// <param name="Column">The column, or the coordinate.</param>
/// <param name="Text">The value, as text with a decimal point.</param>
public readonly record struct OutputValue(string Row, string Column, string Text);

/// <summary>Reads emitted layers and tables value by value, so that two of them can be compared. The host knows no format.</summary>
public interface IOutputReader
{
    /// <summary>The values of a file, in its order.</summary>
    /// <param name="path">The file.</param>
    IEnumerable<OutputValue> Read(string path);
}
