using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>The storms of a record, in order of time.</summary>
public sealed class StormList : Artifact, IShownTable
{
    /// <summary>Creates the list.</summary>
    /// <param name="areal">The areal rainfall that they were found in.</param>
    /// <param name="storms">The storms, in order of time.</param>
    public StormList(ArealRainfall areal, ImmutableArray<Storm> storms)
    {
        Areal = areal;
        Storms = storms;
    }

    /// <summary>The areal rainfall that they were found in.</summary>
    public ArealRainfall Areal { get; }

    /// <summary>The storms, in order of time; people number them from 1.</summary>
    public ImmutableArray<Storm> Storms { get; }

    /// <inheritdoc/>
    public string Heading => "Storms";

    /// <summary>
    /// A row a storm and basin: <c>storm, start, end, steps, basin, depth_mm, wettest_step_mm, wettest_end, steps_withheld,
    /// gauges_least, weight_least, touches_gap</c>.
    /// </summary>
    public Table ToTable()
    {
        var basins = Areal.Basins.Basins;
        var rows = Storms
            .SelectMany(
                (storm, s) => storm.Depths.Select((depth, b) => (Number: s + 1, Storm: storm, Basin: b, Depth: depth))
            )
            .ToArray();
        return new Table([
            Column.OfCounts("storm", "", "Number of the storm, in order of time", rows.Select(row => row.Number)),
            Column.OfText(
                "start",
                "Local time after which it began",
                rows.Select(row => Areal.Times.IntervalAt(row.Storm.FirstStep).StartText)
            ),
            Column.OfText(
                "end",
                "Local time up to which it lasted",
                rows.Select(row => Areal.Times.IntervalAt(row.Storm.LastStep).EndText)
            ),
            Column.OfCounts("steps", "", "How many steps it lasted", rows.Select(row => row.Storm.Steps)),
            Column.OfText("basin", "Basin id", rows.Select(row => basins[row.Basin].Id)),
            Column.OfNumbers(
                "depth_mm",
                "mm",
                6,
                "Mean areal rainfall over the storm, of the steps that have a value; blank where none has",
                rows.Select(row => row.Depth.DepthMillimetres)
            ),
            Column.OfNumbers(
                "wettest_step_mm",
                "mm",
                6,
                "The most in one step",
                rows.Select(row => row.Depth.WettestMillimetres)
            ),
            Column.OfText(
                "wettest_end",
                "Local time at which that step ended; blank where none has a value",
                rows.Select(row =>
                    row.Depth.WettestMillimetres is null ? "" : Areal.Times.IntervalAt(row.Depth.WettestStep).EndText
                )
            ),
            Column.OfCounts(
                "steps_withheld",
                "",
                "Steps without a value; where there are any the depth may be too low",
                rows.Select(row => row.Depth.StepsWithheld)
            ),
            Column.OfCounts(
                "gauges_least",
                "",
                "The least number of gauges with weight that reported at a step",
                rows.Select(row => row.Depth.LeastGaugesReporting)
            ),
            Column.OfNumbers(
                "weight_least",
                "",
                12,
                "The least share of the basin's weight in the full network that reported at a step",
                rows.Select(row => (double?)row.Depth.LeastWeightReporting)
            ),
            Column.OfText(
                "touches_gap",
                "yes where a step without a value, or an end of the record, lies within the storm or so near that it may have gone on there",
                rows.Select(row => row.Storm.TouchesGap ? "yes" : "no")
            ),
        ]);
    }

    /// <inheritdoc/>
    public override string Describe() =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(Storms.Length, "storm")} over {Counted.Of(Areal.Basins.Basins.Length, "basin")}"
        );

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Areal);
        writer.Write(ToTable());
    }
}
