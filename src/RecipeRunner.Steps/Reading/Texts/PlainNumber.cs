using System.Runtime.CompilerServices;

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
        var at = Digits(text, 0, ref digits);
        if (at == text.Length)
        {
            number = digits;
            return true;
        }

        var decimals = text.Length - at - 1;
        if (text[at] != '.' || text.Length == 1 || Digits(text, at + 1, ref digits) < text.Length)
        {
            return false;
        }

        number = digits / Powers[decimals];
        return true;
    }

    /// <summary>Reads digits from a place, and says where they end.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static int Digits(ReadOnlySpan<char> text, int at, ref long digits)
    {
        for (; at < text.Length; at++)
        {
            var digit = (uint)(text[at] - '0');
            if (digit > 9)
            {
                break;
            }

            digits = (digits * 10) + digit;
        }

        return at;
    }
}
