using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>What every areal value rests on: a row a basin and step.</summary>
public sealed class CoverageTable : Artifact, ITabular
{
    /// <summary>Creates the table.</summary>
    /// <param name="areal">The values.</param>
    public CoverageTable(ArealRainfall areal) => Areal = areal;

    /// <summary>The values.</summary>
    public ArealRainfall Areal { get; }

    /// <summary>Columns <c>basin, end, gauges_reporting, gauges_estimated, weight_reporting, nearest_reporting_km, status</c>.</summary>
    public Table ToTable()
    {
        var basins = Areal.Basins.Basins;
        var rows = Enumerable
            .Range(0, basins.Length)
            .SelectMany(b =>
                Enumerable.Range(0, Areal.Times.Count).Select(t => (Basin: b, Step: t, Value: Areal.At(t, b)))
            )
            .ToArray();
        var ends = Enumerable.Range(0, Areal.Times.Count).Select(t => Areal.Times.IntervalAt(t).EndText).ToArray();
        return new Table([
            Column.OfText("basin", "Basin id", rows.Select(row => basins[row.Basin].Id)),
            Column.OfText("end", "Local time up to which the rain fell", rows.Select(row => ends[row.Step])),
            Column.OfCounts(
                "gauges_reporting",
                "",
                "Gauges with weight in the full network that reported",
                rows.Select(row => row.Value.GaugesReporting)
            ),
            Column.OfCounts(
                "gauges_estimated",
                "",
                "How many of them gave an estimated depth",
                rows.Select(row => row.Value.GaugesEstimated)
            ),
            Column.OfNumbers(
                "weight_reporting",
                "",
                12,
                "Share of the basin's weight in the full network that reported, 0 to 1",
                rows.Select(row => (double?)row.Value.WeightReporting)
            ),
            Column.OfNumbers(
                "nearest_reporting_km",
                "km",
                3,
                "Distance from the basin (0 inside) to the nearest reporting gauge",
                rows.Select(row => row.Value.NearestReportingMetres / 1000)
            ),
            Column.OfText("status", "complete, partial or withheld", rows.Select(row => StatusText(row.Value.Status))),
        ]);
    }

    /// <inheritdoc/>
    public override string Describe() =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(Areal.Count, "value")}, {Areal.WithheldCount:N0} withheld"
        );

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer) => writer.Write(Areal);

    private static string StatusText(ArealStatus status) =>
        status switch
        {
            ArealStatus.Complete => "complete",
            ArealStatus.Partial => "partial",
            _ => "withheld",
        };
}
