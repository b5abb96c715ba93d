using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Weighting;

/// <summary>
/// Splits the plane into the part nearest to each gauge. Outlines are drawn to a frame about the gauges, half their
/// larger extent wider on each side and at least ten kilometres; weights take the cells without end.
/// </summary>
/// <param name="Gauges">The network, in a projected working grid.</param>
/// <example><code>var cells = gauges.ThiessenCells();</code></example>
[Step("Thiessen cells", Word = "cells", Source = "Thiessen 1911, doi:10.1175/1520-0493(1911)39<1082b:PAFLA>2.0.CO;2")]
public sealed record ThiessenCellsStep(GaugeNetwork Gauges) : Step<CellLayer>
{
    private const double LeastMarginMetres = 10_000;

    /// <inheritdoc/>
    public override CellLayer Execute(StepContext context)
    {
        WorkingGrid.RequireForAreas(Gauges.ReferenceSystem, Gauges.Source, Gauges.Bounds);
        var cells = NetworkCells.Of(Gauges);
        var bounds = Gauges.Bounds;
        var drawn = bounds.Grow(Math.Max(LeastMarginMetres, Math.Max(bounds.Width, bounds.Height) / 2));
        var frame = new Frame(drawn.West, drawn.South, drawn.East, drawn.North);
        context.Assume(
            "Every place takes the rain of the gauge nearest to it by straight distance in the working grid (Thiessen 1911); height and exposure are not considered."
        );
        return new CellLayer(
            Gauges,
            [.. Enumerable.Range(0, Gauges.Gauges.Length).Select(gauge => NetworkCells.Outline(cells, gauge, frame))],
            drawn
        );
    }
}

/// <summary>The verb for <see cref="ThiessenCellsStep"/>.</summary>
public static class ThiessenCellsVerb
{
    /// <inheritdoc cref="ThiessenCellsStep"/>
    /// <param name="gauges">The network, in a projected working grid.</param>
    public static CellLayer ThiessenCells(this GaugeNetwork gauges) => gauges.Run(new ThiessenCellsStep(gauges));
}
