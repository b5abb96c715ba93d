using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Finds the columns that a form names, by name in the first row or by number.</summary>
internal sealed class ColumnFinder(string file, string[] first)
{
    /// <summary>The index of a column, from 0.</summary>
    /// <exception cref="RefusedException">There is no such column, or more than one.</exception>
    public int Find(FileColumn column)
    {
        if (column.Number == 0)
        {
            CsvText.RequireDistinct(
                [.. first.Where(name => string.Equals(name, column.Name, StringComparison.Ordinal))],
                file
            );
            return FieldNames.Find(file, first, column.Name);
        }

        return column.Number >= 1 && column.Number <= first.Length
            ? column.Number - 1
            : throw new RefusedException(
                Finding.Error(
                    "RR0265",
                    new Place(file),
                    FormattableString.Invariant(
                        $"The form names column {column.Number}; the first row has {first.Length}."
                    ),
                    "Columns count from 1."
                )
            );
    }
}
