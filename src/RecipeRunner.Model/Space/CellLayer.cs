using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Space;

/// <summary>
/// The Thiessen cells of a network: for each gauge the part of the plane nearer to it than to any other.
/// Outer cells have no end; the drawn outlines are cut to a frame about the gauges, the weights are not.
/// </summary>
public sealed class CellLayer : Artifact, IMapLayer
{
    /// <summary>Creates the layer.</summary>
    /// <param name="gauges">The network, in a projected system.</param>
    /// <param name="outlines">A region a gauge in the network's order, cut to the frame; empty where it misses the frame.</param>
    /// <param name="frame">The rectangle to which outlines are cut, in metres.</param>
    public CellLayer(GaugeNetwork gauges, ImmutableArray<Region> outlines, Bounds frame)
    {
        Gauges = gauges;
        Outlines = outlines;
        Frame = frame;
    }

    /// <summary>The network whose cells these are.</summary>
    public GaugeNetwork Gauges { get; }

    /// <summary>A region a gauge, in the network's order.</summary>
    public ImmutableArray<Region> Outlines { get; }

    /// <summary>The rectangle to which outlines are cut, in metres.</summary>
    public Bounds Frame { get; }

    /// <inheritdoc/>
    public ReferenceSystem ReferenceSystem => Gauges.ReferenceSystem;

    /// <inheritdoc/>
    public FeatureTable ToFeatures() =>
        new(
            GeometryKind.Region,
            [.. Outlines.Select(outline => new Shape(outline))],
            new Table([Column.OfText("gauge", "Gauge id", Gauges.Gauges.Select(gauge => gauge.Id))])
        );

    /// <inheritdoc/>
    public override string Describe() => string.Create(CultureInfo.InvariantCulture, $"{Outlines.Length:N0} cells");

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Gauges);
        foreach (var outline in Outlines)
        {
            writer.Write(outline);
        }
    }
}
