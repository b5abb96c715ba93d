using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>Mean areal rainfall of basins through time.</summary>
public sealed class ArealRainfall : Artifact, ITabular
{
    private readonly ArealValue[] values;

    /// <summary>Creates the series.</summary>
    /// <param name="basins">The basins, a column each.</param>
    /// <param name="times">The steps of time.</param>
    /// <param name="values">Values, step after step, one a basin.</param>
    /// <exception cref="ArgumentException">The number of values is not steps times basins.</exception>
    public ArealRainfall(BasinLayer basins, Timeline times, ArealValue[] values)
    {
        if (values.Length != basins.Basins.Length * times.Count)
        {
            throw new ArgumentException("A value is needed for every basin at every step.", nameof(values));
        }

        Basins = basins;
        Times = times;
        this.values = values;
    }

    /// <summary>The basins, a column each.</summary>
    public BasinLayer Basins { get; }

    /// <summary>The steps of time.</summary>
    public Timeline Times { get; }

    /// <summary>The number of values withheld.</summary>
    public int WithheldCount => values.Count(value => value.Status == ArealStatus.Withheld);

    /// <summary>The number of values, given or withheld.</summary>
    public int Count => values.Length;

    /// <summary>The value of one basin at one step.</summary>
    /// <param name="step">Index of the step.</param>
    /// <param name="basin">Index of the basin.</param>
    public ArealValue At(int step, int basin) => values[(step * Basins.Basins.Length) + basin];

    /// <summary>Columns <c>start</c>, <c>end</c> and one a basin with depths in mm, blank where withheld.</summary>
    public Table ToTable()
    {
        var intervals = Enumerable.Range(0, Times.Count).Select(Times.IntervalAt).ToArray();
        return new Table([
            Column.OfText("start", "Local time after which the rain fell", intervals.Select(i => i.StartText)),
            Column.OfText("end", "Local time up to which the rain fell", intervals.Select(i => i.EndText)),
            .. Basins.Basins.Select((basin, b) => DepthColumn(basin, b)),
        ]);
    }

    /// <inheritdoc/>
    public override string Describe() =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(Basins.Basins.Length, "basin")} x {Counted.Of(Times.Count, "step")}, {WithheldCount:N0} withheld"
        );

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Basins);
        writer.Write(Times);
        foreach (var value in values)
        {
            writer.Write(value.DepthMillimetres);
            writer.Write((int)value.Status);
            writer.Write(value.GaugesReporting);
            writer.Write(value.GaugesEstimated);
            writer.Write(value.WeightReporting);
            writer.Write(value.NearestReportingMetres);
        }
    }

    private Column DepthColumn(Basin basin, int b) =>
        Column.OfNumbers(
            ColumnName(basin.Id),
            "mm",
            6,
            $"Mean areal rainfall of {basin.Name}; blank where withheld",
            Enumerable.Range(0, Times.Count).Select(t => At(t, b).DepthMillimetres)
        );

    /// <summary>The basin's id, told apart from the columns that every such table has.</summary>
    private static string ColumnName(string id) => id is "start" or "end" ? $"{id} (basin)" : id;
}
