using System.Globalization;
using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Emitting;

/// <summary>The text of a table's cell, the same on every machine.</summary>
internal static class CellText
{
    /// <summary>Text as it is, a number with its column's decimals at most and a decimal point, blank where there is none.</summary>
    public static string Of(Column column, int row) =>
        column.Kind == ColumnKind.Text ? column.Texts[row]
        : column.Numbers[row] is { } number ? NumberText(number, column.Decimals)
        : "";

    private static string NumberText(double number, int decimals)
    {
        var rounded = Math.Round(number, decimals) + 0.0;
        return rounded.ToString(Formats[decimals], CultureInfo.InvariantCulture);
    }

    private static readonly string[] Formats =
    [
        .. Enumerable.Range(0, 16).Select(decimals => decimals == 0 ? "0" : "0." + new string('#', decimals)),
    ];
}
