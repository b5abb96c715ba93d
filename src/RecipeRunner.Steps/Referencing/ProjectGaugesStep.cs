using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Carries gauges to another reference system. Projected coordinates are metres on the lattice of 2^-16 m, in the order of the
/// grid's axes, whatever its own unit.
/// </summary>
/// <param name="Gauges">The gauges.</param>
/// <param name="Grid">The system wanted.</param>
/// <param name="Datum">What is accepted between two datums.</param>
[Step("Project gauges", Word = "project", Source = "IOGP 373-7-2")]
public sealed record ProjectGaugesStep(GaugeNetwork Gauges, ReferenceSystem Grid, DatumChoice Datum)
    : Step<GaugeNetwork>
{
    /// <inheritdoc/>
    /// <exception cref="RefusedException">
    /// RR0320: no accepted way leads between the datums. RR0330, RR0333: a gauge is at no place of its system. RR0332: a gauge
    /// is far outside the grid's area.
    /// </exception>
    public override GaugeNetwork Execute(StepContext context)
    {
        ArgumentNullException.ThrowIfNull(context);
        var transform = GridTransform.Between(Gauges.ReferenceSystem, Grid, Datum);
        var places = Gauges.Gauges.Select(gauge => gauge.Place).ToArray();
        var degrees = new Location[places.Length];
        var source = new AreaWatch(transform.Source, Gauges.Source);
        var target = new AreaWatch(transform.Target, Gauges.Source);
        for (var i = 0; i < places.Length; i++)
        {
            var item = $"gauge {Gauges.Gauges[i].Id}";
            transform.ToDegrees(places.AsSpan(i, 1), degrees.AsSpan(i, 1), new Place(Gauges.Source, Item: item));
            source.See(item, degrees.AsSpan(i, 1));
            target.See(item, degrees.AsSpan(i, 1));
        }

        source.ThrowIfFar();
        target.ThrowIfFar();
        var results = new Location[places.Length];
        transform.FromDegrees(places, degrees, results, new Place(Gauges.Source));
        DatumReport.Report(transform, context, Gauges.Source);
        target.Report(context);
        return new GaugeNetwork(
            Gauges.Gauges.Select((gauge, i) => gauge with { Place = results[i] }),
            transform.To,
            Gauges.Source
        );
    }
}

/// <summary>What a recipe writes to project gauges.</summary>
public static class ProjectGaugesVerb
{
    /// <summary>The gauges in another reference system, such as a working grid.</summary>
    /// <param name="gauges">The gauges.</param>
    /// <param name="grid">The system wanted: <c>Crs("EPSG:…")</c>.</param>
    /// <param name="datum">What is accepted between two datums; only published null transformations where left out.</param>
    public static GaugeNetwork To(this GaugeNetwork gauges, ReferenceSystem grid, DatumChoice? datum = null)
    {
        ArgumentNullException.ThrowIfNull(gauges);
        return gauges.Run(new ProjectGaugesStep(gauges, grid, datum ?? DatumChoice.Published));
    }
}
