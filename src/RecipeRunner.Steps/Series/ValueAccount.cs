using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Weights;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Series;

/// <summary>Accounts for single areal values: which gauges spoke, with what weight, and which were silent.</summary>
internal sealed class ValueAccount(MeanRainStep step, int[] columns)
{
    /// <summary>The account of one value.</summary>
    public ArealAccount Of(ArealRainfall areal, int t, int basin)
    {
        var full = step.Weights.Weights.Where(weight => weight.Basin == basin).ToArray();
        var silent = full.Where(weight => !Reports(weight.Gauge, t))
            .Select(weight => new SilentShare(
                IdOf(weight.Gauge),
                StatusOf(weight.Gauge, t),
                weight.AreaSquareMetres,
                weight.Share
            ));
        ImmutableArray<GaugeShare> shares =
            areal.At(t, basin).Status == ArealStatus.Withheld ? [] : Shares(full, t, basin);
        return new ArealAccount(shares, [.. silent]);
    }

    private ImmutableArray<GaugeShare> Shares(Weight[] full, int t, int basin)
    {
        var region = step.Weights.Basins.Basins[basin].Shape;
        var distances = new GaugeDistances(region, step.Weights.Cells.Gauges);
        return
        [
            .. InForce(full, t, basin)
                .Select(pair => new GaugeShare(
                    IdOf(pair.Gauge),
                    step.Rain.DepthsAt(t)[columns[pair.Gauge]],
                    StatusOf(pair.Gauge, t),
                    distances.ToGauge(pair.Gauge),
                    pair.Weight * region.Area,
                    pair.Weight
                )),
        ];
    }

    private IEnumerable<(int Gauge, double Weight)> InForce(Weight[] full, int t, int basin)
    {
        var reporting = full.Where(weight => Reports(weight.Gauge, t)).ToArray();
        if (reporting.Length == full.Length)
        {
            return full.Select(weight => (weight.Gauge, weight.Share));
        }

        if (step.Gaps == GapPolicy.Rescale)
        {
            var share = reporting.Sum(weight => weight.Share);
            return reporting.Select(weight => (weight.Gauge, weight.Share / share));
        }

        bool[] reports = [.. Enumerable.Range(0, columns.Length).Select(gauge => Reports(gauge, t))];
        var (gauges, weights) = RedrawnWeights.Of(step.Weights).Of(basin, reports);
        return gauges.Zip(weights);
    }

    private string IdOf(int gauge) => step.Weights.Cells.Gauges.Gauges[gauge].Id;

    private RecordStatus StatusOf(int gauge, int t) =>
        columns[gauge] < 0 ? RecordStatus.Missing : step.Rain.StatusesAt(t)[columns[gauge]];

    private bool Reports(int gauge, int t) => StatusOf(gauge, t).Reports();
}
