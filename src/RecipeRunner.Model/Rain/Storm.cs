using System.Collections.Immutable;

namespace RecipeRunner.Model.Rain;

/// <summary>What one basin had in one storm.</summary>
/// <param name="DepthMillimetres">The sum of the steps that have a value; null where none has.</param>
/// <param name="WettestMillimetres">The largest of them; null where none has a value.</param>
/// <param name="WettestStep">Its index in the record; the storm's first step where none has a value.</param>
/// <param name="StepsWithheld">Steps of the storm without a value; where there are any the depth may be too low.</param>
/// <param name="LeastGaugesReporting">The least number of gauges with weight that reported at a step.</param>
/// <param name="LeastWeightReporting">The least share of the basin's weight that reported at a step, 0 to 1.</param>
public readonly record struct StormDepth(
    double? DepthMillimetres,
    double? WettestMillimetres,
    int WettestStep,
    int StepsWithheld,
    int LeastGaugesReporting,
    double LeastWeightReporting
);

/// <summary>A stretch of rain with dry steps before and after.</summary>
/// <param name="FirstStep">Index of the first wet step in the record.</param>
/// <param name="LastStep">Index of the last wet step.</param>
/// <param name="MeanDepthMillimetres">The depth of the series that the storm was found in.</param>
/// <param name="TouchesGap">True where a step without a value lies within it, or so near that it may have gone on there.</param>
/// <param name="Depths">A value a basin.</param>
public sealed record Storm(
    int FirstStep,
    int LastStep,
    double MeanDepthMillimetres,
    bool TouchesGap,
    ImmutableArray<StormDepth> Depths
)
{
    /// <summary>How many steps it lasted.</summary>
    public int Steps => LastStep - FirstStep + 1;
}
