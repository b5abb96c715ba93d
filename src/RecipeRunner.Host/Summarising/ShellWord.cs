namespace RecipeRunner.Host.Summarising;

/// <summary>Writes a word so that a POSIX shell takes it as it is (IEEE Std 1003.1, Shell Command Language, 2.2.2).</summary>
internal static class ShellWord
{
    /// <summary>The word, in single quotes where it holds anything but plain letters.</summary>
    public static string Of(string word) =>
        word.All(letter => char.IsAsciiLetterOrDigit(letter) || letter is '_' or '.' or '/' or '=' or '-')
            ? word
            : $"'{word.Replace("'", "'\\''", StringComparison.Ordinal)}'";
}
