using System.Globalization;
using CsCheck;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>The quick reader gives the very double that the platform's reader gives, or leaves the text to it.</summary>
public sealed class PlainNumberTests
{
    private static readonly Gen<string> Decimals = Gen.Select(
        Gen.Long[0, 999_999_999_999_999],
        Gen.Int[0, 15],
        Gen.Int[0, 3],
        (digits, point, zeros) =>
        {
            var text = new string('0', zeros) + digits.ToString(CultureInfo.InvariantCulture);
            return point < text.Length ? text.Insert(text.Length - point, ".") : text;
        }
    );

    [Fact]
    public void Decimals_are_read_as_the_platform_reads_them() => Decimals.Sample(Agrees, iter: 100_000);

    [Fact]
    public void Texts_of_digits_points_and_other_letters_are_read_as_the_platform_reads_them_or_left_to_it() =>
        Gen.Char["0123456789..-+eE, "].Array[0, 8].Select(letters => new string(letters)).Sample(Agrees, iter: 100_000);

    [Theory]
    [InlineData("0", 0)]
    [InlineData("12.3", 12.3)]
    [InlineData(".5", 0.5)]
    [InlineData("5.", 5)]
    [InlineData("0.1", 0.1)]
    [InlineData("99999999999999.9", 0)]
    [InlineData("99999999999999", 99999999999999)]
    public void Plain_numbers_are_read(string text, double expected)
    {
        PlainNumber.TryRead(text, out var number).ShouldBe(text.Length <= 15);
        number.ShouldBe(expected);
    }

    [Theory]
    [InlineData("")]
    [InlineData(".")]
    [InlineData("-1")]
    [InlineData("1.2.3")]
    [InlineData("1e3")]
    [InlineData(" 1")]
    [InlineData("１")]
    public void Everything_else_is_left_to_the_platform(string text) =>
        PlainNumber.TryRead(text, out _).ShouldBeFalse();

    private static void Agrees(string text)
    {
        if (PlainNumber.TryRead(text, out var number))
        {
            var expected = double.Parse(text, NumberStyles.Float, CultureInfo.InvariantCulture);
            BitConverter.DoubleToInt64Bits(number).ShouldBe(BitConverter.DoubleToInt64Bits(expected), text);
        }
    }
}
