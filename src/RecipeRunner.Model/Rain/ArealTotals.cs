using System.Collections.Immutable;
using System.Globalization;
using NodaTime;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>The total of one basin over one period.</summary>
/// <param name="DepthMillimetres">The sum of the steps that have a value; null where too few have one.</param>
/// <param name="StepsWithValue">Steps that have a value.</param>
/// <param name="StepsExpected">Steps that the period has by the calendar.</param>
/// <param name="LeastGaugesReporting">The least number of gauges with weight that reported at a step that has a value; 0 where none has.</param>
/// <param name="MeanWeightReporting">The mean share of the basin's weight that reported at those steps, 0 to 1; 0 where none has.</param>
public readonly record struct ArealTotal(
    double? DepthMillimetres,
    int StepsWithValue,
    int StepsExpected,
    int LeastGaugesReporting,
    double MeanWeightReporting
);

/// <summary>Totals of areal rainfall of basins over periods.</summary>
public sealed class ArealTotals : Artifact, ITabular
{
    private readonly ArealTotal[] totals;

    /// <summary>Creates the totals.</summary>
    /// <param name="basins">The basins, a column each.</param>
    /// <param name="period">How steps were grouped.</param>
    /// <param name="starts">The first date of each period.</param>
    /// <param name="totals">Totals, period after period, one a basin.</param>
    /// <exception cref="ArgumentException">The number of totals is not periods times basins.</exception>
    public ArealTotals(BasinLayer basins, Every period, ImmutableArray<LocalDate> starts, ArealTotal[] totals)
    {
        if (totals.Length != basins.Basins.Length * starts.Length)
        {
            throw new ArgumentException("A total is needed for every basin in every period.", nameof(totals));
        }

        Basins = basins;
        Period = period;
        Starts = starts;
        this.totals = totals;
    }

    /// <summary>The basins, a column each.</summary>
    public BasinLayer Basins { get; }

    /// <summary>How steps were grouped.</summary>
    public Every Period { get; }

    /// <summary>The first date of each period.</summary>
    public ImmutableArray<LocalDate> Starts { get; }

    /// <summary>The total of one basin over one period.</summary>
    /// <param name="period">Index of the period.</param>
    /// <param name="basin">Index of the basin.</param>
    public ArealTotal At(int period, int basin) => totals[(period * Basins.Basins.Length) + basin];

    /// <summary>Columns <c>period</c> and one a basin with depths in mm, blank where withheld.</summary>
    public Table ToTable() =>
        new([
            Column.OfText("period", "Period over which steps are summed", Starts.Select(Period.NameOf)),
            .. Basins.Basins.Select(
                (basin, b) =>
                    Column.OfNumbers(
                        basin.Id == "period" ? "period (basin)" : basin.Id,
                        "mm",
                        6,
                        $"Total areal rainfall of {basin.Name}; blank where withheld",
                        Enumerable.Range(0, Starts.Length).Select(p => At(p, b).DepthMillimetres)
                    )
            ),
        ]);

    /// <inheritdoc/>
    public override string Describe() =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(Basins.Basins.Length, "basin")} x {Counted.Of(Starts.Length, "period")}, {totals.Count(t => t.DepthMillimetres is null):N0} withheld"
        );

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Basins);
        writer.Write(Period.ToSettingText());
        writer.Write(Starts.Length);
        foreach (var start in Starts)
        {
            writer.Write(Period.NameOf(start));
        }

        foreach (var total in totals)
        {
            writer.Write(total.DepthMillimetres);
            writer.Write(total.StepsWithValue);
            writer.Write(total.StepsExpected);
            writer.Write(total.LeastGaugesReporting);
            writer.Write(total.MeanWeightReporting);
        }
    }
}
