namespace RecipeRunner.Steps.Answers;

/// <summary>A stretch of wet steps.</summary>
/// <param name="FirstStep">Index of the first wet step.</param>
/// <param name="LastStep">Index of the last wet step.</param>
/// <param name="DepthMillimetres">The sum of all steps from first to last that have a value.</param>
/// <param name="TouchesGap">True where a step without a value lies within it or parts it from its dry neighbours.</param>
internal sealed record WetSpell(int FirstStep, int LastStep, double DepthMillimetres, bool TouchesGap);

/// <summary>Finds wet spells, parted by enough dry steps.</summary>
internal static class StormFinder
{
    /// <summary>The wet spells, in order.</summary>
    /// <param name="series">Depths in mm; null where there is no value.</param>
    /// <param name="dryFor">How many steps on end that are not wet part two spells.</param>
    /// <param name="wetFrom">The least depth of a wet step.</param>
    public static IEnumerable<WetSpell> Find(double?[] series, int dryFor, double wetFrom)
    {
        for (var t = 0; t < series.Length; t++)
        {
            if (series[t] >= wetFrom)
            {
                var last = LastOf(series, t, dryFor, wetFrom);
                yield return SpellOf(series, t, last, dryFor);
                t = last;
            }
        }
    }

    private static int LastOf(double?[] series, int first, int dryFor, double wetFrom)
    {
        var last = first;
        for (var t = first + 1; t < series.Length && t - last <= dryFor; t++)
        {
            last = series[t] >= wetFrom ? t : last;
        }

        return last;
    }

    /// <summary>A gap within, or among the steps before and after that would have to be dry, leaves it open whether rain went on.</summary>
    private static WetSpell SpellOf(double?[] series, int first, int last, int dryFor)
    {
        var depth = 0.0;
        for (var t = first; t <= last; t++)
        {
            depth += series[t] ?? 0;
        }

        var about = Enumerable.Range(first - dryFor, last - first + 1 + (2 * dryFor));
        var touches = about.Any(t => t >= 0 && t < series.Length && series[t] is null);
        return new WetSpell(first, last, depth, touches || first - dryFor < 0 || last + dryFor >= series.Length);
    }
}
