namespace RecipeRunner.Numerics.Gaps;

/// <summary>A block of steps: a row a step in every array.</summary>
internal sealed class StepBlock(int sites, int polygons, double[] depths, bool[] reports, bool[] wanted, double[] means)
{
    public ReadOnlySpan<double> Depths(int step) => depths.AsSpan(step * sites, sites);

    public ReadOnlySpan<bool> Reports(int step) => reports.AsSpan(step * sites, sites);

    public bool IsWanted(int step, int polygon) => wanted[(step * polygons) + polygon];

    public ref double Mean(int step, int polygon) => ref means[(step * polygons) + polygon];
}
