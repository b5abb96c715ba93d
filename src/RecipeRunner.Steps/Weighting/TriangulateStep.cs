using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Weighting;

/// <summary>
/// Joins the gauges into triangles whose circumcircles hold no other gauge (Delaunay). Gauges in one line, or fewer than
/// three, give no triangle.
/// </summary>
/// <param name="Gauges">The network, in a projected working grid.</param>
/// <example><code>EmitLayer(gauges.Triangulate(), "triangles");</code></example>
[Step("Triangulate", Word = "triangles", Source = "Delaunay 1934, Sur la sphère vide")]
public sealed record TriangulateStep(GaugeNetwork Gauges) : Step<TriangleLayer>
{
    /// <inheritdoc/>
    public override TriangleLayer Execute(StepContext context)
    {
        WorkingGrid.RequireForAreas(Gauges.ReferenceSystem, Gauges.Source, Gauges.Bounds);
        var corners = NetworkCells.Triangulate(Gauges).Corners;
        var triangles = ImmutableArray.CreateBuilder<GaugeTriangle>(corners.Length / 3);
        for (var i = 0; i < corners.Length; i += 3)
        {
            triangles.Add(LowestFirst(corners[i], corners[i + 1], corners[i + 2]));
        }

        triangles.Sort((a, b) => (a.A, a.B, a.C).CompareTo((b.A, b.B, b.C)));
        return new TriangleLayer(Gauges, triangles.ToImmutable());
    }

    private static GaugeTriangle LowestFirst(int a, int b, int c) =>
        a < b && a < c ? new GaugeTriangle(a, b, c)
        : b < c ? new GaugeTriangle(b, c, a)
        : new GaugeTriangle(c, a, b);
}

/// <summary>The verb for <see cref="TriangulateStep"/>.</summary>
public static class TriangulateVerb
{
    /// <inheritdoc cref="TriangulateStep"/>
    /// <param name="gauges">The network, in a projected working grid.</param>
    public static TriangleLayer Triangulate(this GaugeNetwork gauges) => gauges.Run(new TriangulateStep(gauges));
}
