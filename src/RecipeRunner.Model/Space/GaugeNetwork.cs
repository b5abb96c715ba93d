using System.Collections.Immutable;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Space;

/// <summary>A rain gauge.</summary>
/// <param name="Id">Its unique key in its network, by which records name it.</param>
/// <param name="Place">Where it stands.</param>
/// <param name="ElevationMetres">Height above sea level in metres, where the source gives it.</param>
public sealed record Gauge(string Id, Location Place, double? ElevationMetres = null);

/// <summary>Gauges in one reference system.</summary>
public sealed class GaugeNetwork : Artifact, IMapLayer
{
    /// <summary>Creates the network.</summary>
    /// <param name="gauges">Gauges with distinct ids; they are held in ordinal order of their ids, whatever order they come in.</param>
    /// <param name="referenceSystem">The system of all coordinates.</param>
    /// <param name="source">The file or step it came from, as people would name it.</param>
    public GaugeNetwork(IEnumerable<Gauge> gauges, ReferenceSystem referenceSystem, string source)
    {
        Gauges = [.. gauges.OrderBy(gauge => gauge.Id, StringComparer.Ordinal)];
        ReferenceSystem = referenceSystem;
        Source = source;
    }

    /// <summary>The gauges, in ordinal order of their ids.</summary>
    public ImmutableArray<Gauge> Gauges { get; }

    /// <inheritdoc/>
    public ReferenceSystem ReferenceSystem { get; }

    /// <summary>The file or step it came from.</summary>
    public string Source { get; }

    /// <summary>The rectangle about all gauges.</summary>
    public Bounds Bounds => Bounds.Of(Gauges.Select(gauge => gauge.Place));

    /// <inheritdoc/>
    public FeatureTable ToFeatures()
    {
        var ids = Column.OfText("gauge", "Gauge id", Gauges.Select(gauge => gauge.Id));
        var elevations = Gauges.Any(gauge => gauge.ElevationMetres.HasValue)
            ?
            [
                Column.OfNumbers(
                    "elev_m",
                    "m",
                    3,
                    "Height above sea level",
                    Gauges.Select(gauge => gauge.ElevationMetres)
                ),
            ]
            : ImmutableArray<Column>.Empty;
        return new FeatureTable(
            GeometryKind.Point,
            [.. Gauges.Select(gauge => new Shape(gauge.Place))],
            new Table([ids, .. elevations])
        );
    }

    /// <inheritdoc/>
    public override string Describe() => $"{Counted.Of(Gauges.Length, "gauge")}, {ReferenceSystem.Label}";

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(ReferenceSystem.Wkt);
        writer.Write(Gauges.Length);
        foreach (var gauge in Gauges)
        {
            writer.Write(gauge.Id);
            writer.Write(gauge.Place);
            writer.Write(gauge.ElevationMetres);
        }
    }
}
