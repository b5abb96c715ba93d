namespace RecipeRunner.Numerics.Gaps;

/// <summary>Whether arrays that belong together fit together.</summary>
internal static class Lengths
{
    /// <exception cref="ArgumentException">A length is not the one expected.</exception>
    public static void Check(int length, long expected, string name)
    {
        if (length != expected)
        {
            throw new ArgumentException(FormattableString.Invariant($"Given {length} values, not {expected}."), name);
        }
    }
}
