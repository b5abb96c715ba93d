using System.Globalization;

namespace RecipeRunner.Numerics.Triangulation;

/// <summary>Two or more sites share a place, so the plane cannot be divided between them.</summary>
public sealed class CoincidentSitesException : ArgumentException
{
    internal CoincidentSitesException(IReadOnlyList<int[]> groups)
        : base(Describe(groups))
    {
        Groups = groups;
    }

    /// <summary>
    /// Every place that is taken more than once: the indices of its sites, ascending, as the caller counts them. The
    /// groups are ordered by their first index.
    /// </summary>
    public IReadOnlyList<int[]> Groups { get; }

    /// <summary>The lowest index that shares its place with another site.</summary>
    public int First => Groups[0][0];

    /// <summary>The lowest index that shares the place of <see cref="First"/>.</summary>
    public int Second => Groups[0][1];

    private static string Describe(IReadOnlyList<int[]> groups) =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"Sites {groups[0][0]} and {groups[0][1]} share a place; {groups.Count} place(s) are taken more than once."
        );
}
