namespace RecipeRunner.Steps.Referencing;

/// <summary>A word of well-known text with what its brackets hold.</summary>
/// <param name="Keyword">In upper case, such as <c>PROJCS</c>.</param>
/// <param name="Texts">Quoted texts and bare words, in order.</param>
/// <param name="Numbers">Numbers, in order.</param>
/// <param name="Children">Nested nodes, in order.</param>
internal sealed record WktNode(
    string Keyword,
    IReadOnlyList<string> Texts,
    IReadOnlyList<double> Numbers,
    IReadOnlyList<WktNode> Children
)
{
    /// <summary>The first text; empty where there is none.</summary>
    public string Name => Texts.Count > 0 ? Texts[0] : "";

    /// <summary>The first node of a keyword directly below this one, or null.</summary>
    public WktNode? Child(string keyword) => ChildrenOf(keyword).FirstOrDefault();

    /// <summary>All nodes of a keyword directly below this one.</summary>
    public IEnumerable<WktNode> ChildrenOf(string keyword) =>
        Children.Where(child => string.Equals(child.Keyword, keyword, StringComparison.Ordinal));
}
