using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Space;

/// <summary>The part of one basin that is nearest to one gauge.</summary>
/// <param name="BasinId">The basin.</param>
/// <param name="GaugeId">The gauge.</param>
/// <param name="Shape">The piece.</param>
public sealed record Piece(string BasinId, string GaugeId, Region Shape);

/// <summary>Thiessen cells cut to basins: what to draw to show where weights come from.</summary>
public sealed class PieceLayer : Artifact, IMapLayer
{
    /// <summary>Creates the layer.</summary>
    /// <param name="pieces">Pieces, in the basins' order and within a basin in the gauges' order.</param>
    /// <param name="referenceSystem">The system of all coordinates, projected.</param>
    public PieceLayer(ImmutableArray<Piece> pieces, ReferenceSystem referenceSystem)
    {
        Pieces = pieces;
        ReferenceSystem = referenceSystem;
    }

    /// <summary>The pieces.</summary>
    public ImmutableArray<Piece> Pieces { get; }

    /// <inheritdoc/>
    public ReferenceSystem ReferenceSystem { get; }

    /// <inheritdoc/>
    public FeatureTable ToFeatures() =>
        new(
            GeometryKind.Region,
            [.. Pieces.Select(piece => new Shape(piece.Shape))],
            new Table([
                Column.OfText("basin", "Basin id", Pieces.Select(piece => piece.BasinId)),
                Column.OfText("gauge", "Gauge id", Pieces.Select(piece => piece.GaugeId)),
                Column.OfNumbers(
                    "area_m2",
                    "m²",
                    4,
                    "Area in the working grid",
                    Pieces.Select(piece => (double?)piece.Shape.Area)
                ),
            ])
        );

    /// <inheritdoc/>
    public override string Describe() => string.Create(CultureInfo.InvariantCulture, $"{Pieces.Length:N0} pieces");

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(ReferenceSystem.Wkt);
        writer.Write(Pieces.Length);
        foreach (var piece in Pieces)
        {
            writer.Write(piece.BasinId);
            writer.Write(piece.GaugeId);
            writer.Write(piece.Shape);
        }
    }
}
