using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>
/// Shares each total of several steps out over its steps in the pattern of the nearest gauges: to each step the part that it has in
/// the sum of their depths, weighted by the inverse square of distance. The total is kept; the shares are marked estimated. Where no
/// neighbour reported at all of these steps, or none had rain, the steps stay without a value (common practice, no source).
/// </summary>
/// <param name="Rain">Gauge records.</param>
/// <param name="Gauges">The network, in a working grid, which says who is near.</param>
/// <param name="Neighbours">How many of the nearest gauges that reported at all of the steps give the pattern.</param>
/// <example><code>var whole = rain.SpreadAccumulations(gauges);</code></example>
[Step("Spread accumulations", Word = "spread")]
public sealed record SpreadAccumulationsStep(RainRecords Rain, GaugeNetwork Gauges, int Neighbours)
    : Step<RainRecords>,
        IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        Require();
        var gauges = Rain.GaugeIds.Length;
        var (depths, statuses) = (Rain.CopyDepths(), Rain.CopyStatuses());
        var patterns = new NeighbourPattern(Rain, Gauges, RecordColumns.Match(context, Gauges, Rain), Neighbours);
        var kept = new List<Accumulation>();
        foreach (var total in Rain.Accumulations)
        {
            if (patterns.Of(total) is not { } shares)
            {
                kept.Add(total);
                continue;
            }

            for (var i = 0; i < shares.Length; i++)
            {
                var at = ((total.FirstStep + i) * gauges) + total.Gauge;
                (depths[at], statuses[at]) = (total.DepthMillimetres * shares[i], RecordStatus.Estimated);
            }
        }

        Tell(context, kept);
        var records = new RainRecords(Rain.GaugeIds, Rain.Times, depths, statuses, Rain.Source, [.. kept]);
        context.State("values", records.StatusWords());
        return records;
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context)
    {
        var total = Rain
            .Accumulations.Where(total => total.Gauge == gauge && total.FirstStep <= step && step <= total.LastStep)
            .ToArray();
        return [new EarlierValue(Rain, gauge, total.Length == 0 ? step : total[0].LastStep)];
    }

    private void Require()
    {
        if (Gauges.ReferenceSystem.Kind != ReferenceSystemKind.Projected)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0534",
                    new Place(Gauges.Source),
                    $"The gauges are in {Gauges.ReferenceSystem.Label}, in which distances cannot be measured.",
                    "Bring them to the working grid first:   gauges.To(grid)"
                )
            );
        }

        if (Neighbours < 1)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0535",
                    Place.Of("neighbours"),
                    string.Create(CultureInfo.InvariantCulture, $"{Neighbours} neighbours give no pattern."),
                    "Give 1 or more."
                )
            );
        }
    }

    private void Tell(StepContext context, List<Accumulation> kept)
    {
        context.Assume(
            FormattableString.Invariant(
                $"Totals read once for several steps were shared out in the pattern of up to {Neighbours} nearest gauges; the shares are estimates."
            )
        );
        context.State(
            "spread",
            FormattableString.Invariant(
                $"{Rain.Accumulations.Length - kept.Count} of {Rain.Accumulations.Length} totals"
            )
        );
        if (kept.Count > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0536",
                    new Place(Rain.Source),
                    $"No neighbour tells how these totals fell, so their steps stay without a value: {Listing.Of([.. kept.Select(Words)])}.",
                    "Allow more neighbours, or leave them so; the gap policy then says what to do."
                )
            );
        }
    }

    private string Words(Accumulation total) =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{Rain.GaugeIds[total.Gauge]} {total.DepthMillimetres:0.#} mm to {Rain.Times.TextAt(total.LastStep)}"
        );
}

/// <summary>The verb for <see cref="SpreadAccumulationsStep"/>.</summary>
public static class SpreadAccumulationsVerb
{
    /// <inheritdoc cref="SpreadAccumulationsStep"/>
    /// <param name="rain">Gauge records.</param>
    /// <param name="gauges">The network, in a working grid.</param>
    /// <param name="neighbours">How many of the nearest gauges give the pattern; 4 where not given.</param>
    public static RainRecords SpreadAccumulations(this RainRecords rain, GaugeNetwork gauges, int neighbours = 4) =>
        rain.Run(new SpreadAccumulationsStep(rain, gauges, neighbours));
}
