using System.Globalization;

namespace RecipeRunner.Cli.Printing;

/// <summary>A bar with the share done and the time left, where that can be said honestly.</summary>
internal static class ProgressLine
{
    private const int BarWidth = 24;

    public static string Of(string word, double share, double? secondsLeft)
    {
        var full = (int)(Math.Clamp(share, 0, 1) * BarWidth);
        var bar = new string('#', full).PadRight(BarWidth, '.');
        var left = secondsLeft is { } seconds
            ? string.Create(CultureInfo.InvariantCulture, $"  about {Math.Ceiling(seconds):0} s left")
            : "";
        return string.Create(CultureInfo.InvariantCulture, $"  {word}[{bar}] {100 * share:0} %{left}");
    }
}
