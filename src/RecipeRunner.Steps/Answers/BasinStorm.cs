using RecipeRunner.Model.Rain;

namespace RecipeRunner.Steps.Answers;

/// <summary>What one basin had in a wet spell.</summary>
internal static class BasinStorm
{
    /// <summary>The depth of one basin with what it rests on.</summary>
    public static StormDepth Of(ArealRainfall areal, int basin, WetSpell spell)
    {
        double? depth = null;
        double? wettest = null;
        var (wettestStep, withheld) = (spell.FirstStep, 0);
        var (gauges, weight) = (int.MaxValue, double.PositiveInfinity);
        for (var t = spell.FirstStep; t <= spell.LastStep; t++)
        {
            var value = areal.At(t, basin);
            (gauges, weight) = (Math.Min(gauges, value.GaugesReporting), Math.Min(weight, value.WeightReporting));
            if (value.DepthMillimetres is not { } mm)
            {
                withheld++;
                continue;
            }

            depth = (depth ?? 0) + mm;
            (wettest, wettestStep) = wettest >= mm ? (wettest, wettestStep) : (mm, t);
        }

        return new StormDepth(depth, wettest, wettestStep, withheld, gauges, weight);
    }
}
