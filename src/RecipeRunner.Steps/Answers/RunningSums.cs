using RecipeRunner.Model.Rain;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Steps.Answers;

/// <summary>Sums of one basin's rain over some steps on end.</summary>
internal sealed class RunningSums(ArealRainfall areal, int basin, int duration)
{
    /// <summary>How many steps on end.</summary>
    public int Duration => duration;

    /// <summary>The largest sum whose last step is one of some, and that step; the earliest where several are equal.</summary>
    /// <param name="first">Index of the first of these steps.</param>
    /// <param name="count">How many there are.</param>
    /// <returns>Null where no sum has a value for each of its steps.</returns>
    public (double? Largest, int LastStep) LargestEndingWithin(int first, int count)
    {
        double? largest = null;
        var at = -1;
        for (var last = Math.Max(first, duration - 1); last < first + count; last++)
        {
            if (SumEndingAt(last) is { } sum && !(sum <= largest))
            {
                (largest, at) = (sum, last);
            }
        }

        return (largest, at);
    }

    private double? SumEndingAt(int last)
    {
        var sum = default(CompensatedSum);
        for (var t = last - duration + 1; t <= last; t++)
        {
            if (areal.At(t, basin).DepthMillimetres is not { } depth)
            {
                return null;
            }

            sum.Add(depth);
        }

        return sum.Value;
    }
}
