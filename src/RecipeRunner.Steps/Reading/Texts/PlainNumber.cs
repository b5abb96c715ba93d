namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>
/// Reads the numbers of which records are full, such as <c>0</c> or <c>12.3</c>, quickly: at most fifteen digits and one
/// point. Digits and power of ten are then both held exactly, so that their quotient is the double nearest to the text, the
/// one that the platform's own reader gives.
/// </summary>
internal static class PlainNumber
{
    private const int MostDigits = 15;

    private static readonly double[] Powers =
    [
        1,
        1e1,
        1e2,
        1e3,
        1e4,
        1e5,
        1e6,
        1e7,
        1e8,
        1e9,
        1e10,
        1e11,
        1e12,
        1e13,
        1e14,
    ];

    /// <summary>Reads digits with at most one point among or before them; says no to everything else.</summary>
    /// <param name="text">The text.</param>
    /// <param name="number">The number; 0 where it was not read.</param>
    public static bool TryRead(ReadOnlySpan<char> text, out double number)
    {
        number = 0;
        if (text.Length is 0 or > MostDigits)
        {
            return false;
        }

        long digits = 0;
        var point = -1;
        for (var i = 0; i < text.Length; i++)
        {
            var digit = (uint)(text[i] - '0');
            if (digit <= 9)
            {
                digits = (digits * 10) + digit;
            }
            else if (text[i] == '.' && point < 0)
            {
                point = i;
            }
            else
            {
                return false;
            }
        }

        if (point == 0 && text.Length == 1)
        {
            return false;
        }

        number = point < 0 ? digits : digits / Powers[text.Length - 1 - point];
        return true;
    }
}
