using System.Collections.Immutable;
using NetTopologySuite.Geometries;
using NetTopologySuite.Geometries.Prepared;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Weighting;

/// <summary>
/// Cuts Thiessen cells to basins, for a map that shows where weights come from. The pieces are drawn by overlay; the
/// weights are computed on their own and do not rest on these outlines.
/// </summary>
/// <param name="Cells">The cells.</param>
/// <param name="Basins">The basins, in the same working grid.</param>
/// <example><code>EmitLayer(cells.CutTo(basins), "thiessen-cells");</code></example>
[Step("Cut to basins", Word = "cut")]
public sealed record CutToStep(CellLayer Cells, BasinLayer Basins) : Step<PieceLayer>
{
    /// <inheritdoc/>
    public override PieceLayer Execute(StepContext context)
    {
        SameSystem.Require(Basins, Cells.Gauges);
        var bounds = Cells.Gauges.Bounds.With(Basins.Bounds).Grow(1000);
        var outlines = Outlines(new Frame(bounds.West, bounds.South, bounds.East, bounds.North));
        var pieces = ImmutableArray.CreateBuilder<Piece>();
        for (var b = 0; b < Basins.Basins.Length; b++)
        {
            context.Cancellation.ThrowIfCancellationRequested();
            context.Progress((double)b / Basins.Basins.Length);
            pieces.AddRange(PiecesOf(Basins.Basins[b], outlines));
        }

        return new PieceLayer(pieces.ToImmutable(), Basins.ReferenceSystem);
    }

    private Geometry[] Outlines(Frame frame)
    {
        var cells = NetworkCells.Of(Cells.Gauges);
        return
        [
            .. Enumerable
                .Range(0, Cells.Gauges.Gauges.Length)
                .Select(gauge => RegionGeometry.Of(NetworkCells.Outline(cells, gauge, frame))),
        ];
    }

    private IEnumerable<Piece> PiecesOf(Basin basin, Geometry[] outlines)
    {
        var shape = RegionGeometry.Of(basin.Shape);
        var prepared = PreparedGeometryFactory.Prepare(shape);
        for (var gauge = 0; gauge < outlines.Length; gauge++)
        {
            if (!prepared.Intersects(outlines[gauge]))
            {
                continue;
            }

            var piece = RegionGeometry.ToRegion(
                prepared.Covers(outlines[gauge]) ? outlines[gauge] : shape.Intersection(outlines[gauge])
            );
            if (piece.Area > 0)
            {
                yield return new Piece(basin.Id, Cells.Gauges.Gauges[gauge].Id, piece);
            }
        }
    }
}

/// <summary>The verb for <see cref="CutToStep"/>.</summary>
public static class CutToVerb
{
    /// <inheritdoc cref="CutToStep"/>
    /// <param name="cells">The cells.</param>
    /// <param name="basins">The basins, in the same working grid.</param>
    public static PieceLayer CutTo(this CellLayer cells, BasinLayer basins) => cells.Run(new CutToStep(cells, basins));
}
