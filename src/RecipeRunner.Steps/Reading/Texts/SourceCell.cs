using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>Finds a cell of a text table again.</summary>
internal static class SourceCell
{
    /// <summary>The cell that stands in a row.</summary>
    /// <param name="context">Opens the file.</param>
    /// <param name="name">The file.</param>
    /// <param name="line">The line on which the row begins.</param>
    /// <param name="column">The column, from 0.</param>
    public static FileValue At(StepContext context, string name, int line, int column)
    {
        using var text = TextInput.Open(context, name);
        using var reader = CsvText.Open(text);
        while (reader.MoveNext() && CsvText.LineOf(reader.Current) < line) { }

        return new FileValue(new Place(name, line, column + 1), reader.Current[column].ToString());
    }
}
