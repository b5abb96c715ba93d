using System.Globalization;

namespace RecipeRunner.Numerics.Weights;

/// <summary>Why one polygon could not be weighed.</summary>
/// <param name="Polygon">Its index.</param>
/// <param name="Reason">What is wrong, as a clause that follows "polygon so-and-so".</param>
public sealed record PolygonRefusal(int Polygon, string Reason);

/// <summary>Some polygons cannot be weighed: no area, or rings that overlap or run the wrong way.</summary>
public sealed class PolygonsRefusedException : ArgumentException
{
    internal PolygonsRefusedException(IReadOnlyList<PolygonRefusal> refusals)
        : base(Describe(refusals))
    {
        Refusals = refusals;
    }

    /// <summary>All polygons that were refused, in their order; one at least.</summary>
    public IReadOnlyList<PolygonRefusal> Refusals { get; }

    private static string Describe(IReadOnlyList<PolygonRefusal> refusals) =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{refusals.Count} polygon(s) cannot be weighed; polygon {refusals[0].Polygon} {refusals[0].Reason}."
        );
}
