using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Weights;

/// <summary>The share of one basin that goes to one gauge.</summary>
/// <param name="Basin">Index of the basin in its layer.</param>
/// <param name="Gauge">Index of the gauge in its network.</param>
/// <param name="AreaSquareMetres">The area of the basin within the gauge's cell, in the working grid.</param>
/// <param name="Share">That area over the basin's, more than 0 and at most 1.</param>
public readonly record struct Weight(int Basin, int Gauge, double AreaSquareMetres, double Share);

/// <summary>The weights of gauges for basins.</summary>
public sealed class WeightTable : Artifact, ITabular
{
    /// <summary>Creates the table.</summary>
    /// <param name="basins">The basins.</param>
    /// <param name="cells">The cells that were weighed with; their network holds the gauges.</param>
    /// <param name="weights">Weights above zero in the basins' order, within a basin in the gauges' order; each basin's sum to 1.</param>
    public WeightTable(BasinLayer basins, CellLayer cells, ImmutableArray<Weight> weights)
    {
        Basins = basins;
        Cells = cells;
        Weights = weights;
    }

    /// <summary>The basins.</summary>
    public BasinLayer Basins { get; }

    /// <summary>The cells that were weighed with.</summary>
    public CellLayer Cells { get; }

    /// <summary>The weights above zero, in the basins' order, within a basin in the gauges' order.</summary>
    public ImmutableArray<Weight> Weights { get; }

    /// <summary>Columns <c>basin, gauge, area_m2, weight</c>.</summary>
    public Table ToTable() =>
        new([
            Column.OfText("basin", "Basin id", Weights.Select(w => Basins.Basins[w.Basin].Id)),
            Column.OfText("gauge", "Gauge id", Weights.Select(w => Cells.Gauges.Gauges[w.Gauge].Id)),
            Column.OfNumbers(
                "area_m2",
                "m²",
                4,
                "Area of the basin nearest to the gauge, in the working grid",
                Weights.Select(w => (double?)w.AreaSquareMetres)
            ),
            Column.OfNumbers(
                "weight",
                "",
                15,
                "That area over the basin's; a basin's weights sum to 1",
                Weights.Select(w => (double?)w.Share)
            ),
        ]);

    /// <inheritdoc/>
    public override string Describe() =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(Basins.Basins.Length, "basin")}, {Counted.Of(Weights.Length, "weight")}"
        );

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Basins);
        writer.Write(Cells.Gauges);
        writer.Write(Weights.Length);
        foreach (var weight in Weights)
        {
            writer.Write(weight.Basin);
            writer.Write(weight.Gauge);
            writer.Write(weight.AreaSquareMetres);
            writer.Write(weight.Share);
        }
    }
}
