using System.Globalization;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>Reads numbers with a decimal point, the same on every machine.</summary>
internal static class NumberText
{
    /// <summary>A finite number with an optional sign, decimal point and exponent; no grouping of digits.</summary>
    public static bool TryRead(ReadOnlySpan<char> text, out double number) =>
        double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out number) && double.IsFinite(number);

    /// <summary>What to do about text that is not a number.</summary>
    public static string Mend(string text)
    {
        var comma = text.Count(letter => letter == ',');
        if (comma == 1 && TryRead(text.Replace(',', '.'), out _))
        {
            return "It has a decimal comma; write the file with decimal points.";
        }

        return "Correct the cell, or leave it blank where there is no value.";
    }
}
