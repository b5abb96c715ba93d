using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Space;

/// <summary>A triangle of gauges whose circumcircle holds no other gauge.</summary>
/// <param name="A">Index of the first gauge in the network.</param>
/// <param name="B">Index of the second, counter-clockwise.</param>
/// <param name="C">Index of the third.</param>
public readonly record struct GaugeTriangle(int A, int B, int C);

/// <summary>The Delaunay triangulation of a network.</summary>
public sealed class TriangleLayer : Artifact, IMapLayer
{
    /// <summary>Creates the layer.</summary>
    /// <param name="gauges">The network, in a projected system.</param>
    /// <param name="triangles">The triangles, in a fixed order; none where the gauges are fewer than three or in one line.</param>
    public TriangleLayer(GaugeNetwork gauges, ImmutableArray<GaugeTriangle> triangles)
    {
        Gauges = gauges;
        Triangles = triangles;
    }

    /// <summary>The network.</summary>
    public GaugeNetwork Gauges { get; }

    /// <summary>The triangles.</summary>
    public ImmutableArray<GaugeTriangle> Triangles { get; }

    /// <inheritdoc/>
    public ReferenceSystem ReferenceSystem => Gauges.ReferenceSystem;

    /// <inheritdoc/>
    public FeatureTable ToFeatures() =>
        new(
            GeometryKind.Region,
            [.. Triangles.Select(t => new Shape(Region.OfShell([Place(t.A), Place(t.B), Place(t.C)])))],
            new Table([
                Column.OfText("gauge_a", "First corner", Triangles.Select(t => Gauges.Gauges[t.A].Id)),
                Column.OfText("gauge_b", "Second corner", Triangles.Select(t => Gauges.Gauges[t.B].Id)),
                Column.OfText("gauge_c", "Third corner", Triangles.Select(t => Gauges.Gauges[t.C].Id)),
            ])
        );

    /// <inheritdoc/>
    public override string Describe() =>
        string.Create(CultureInfo.InvariantCulture, $"{Triangles.Length:N0} triangles");

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Gauges);
        writer.Write(Triangles.Length);
        foreach (var triangle in Triangles)
        {
            writer.Write(triangle.A);
            writer.Write(triangle.B);
            writer.Write(triangle.C);
        }
    }

    private Location Place(int gauge) => Gauges.Gauges[gauge].Place;
}
