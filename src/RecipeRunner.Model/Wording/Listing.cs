namespace RecipeRunner.Model.Wording;

/// <summary>Lists names in a sentence without letting it grow long.</summary>
public static class Listing
{
    private const int Most = 8;

    /// <summary>The first eight, and how many more there are.</summary>
    /// <param name="names">The names, in the order in which they are to be listed.</param>
    public static string Of(IReadOnlyCollection<string> names)
    {
        var more = names.Count - Most;
        return string.Join(", ", names.Take(Most)) + (more > 0 ? FormattableString.Invariant($" and {more} more") : "");
    }
}
