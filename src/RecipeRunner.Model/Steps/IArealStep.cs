using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Model.Steps;

/// <summary>A step that gives areal rainfall and can account for it: for the hand check, and to tell why two studies differ.</summary>
public interface IArealStep
{
    /// <summary>Weights of the full network.</summary>
    WeightTable Weights { get; }

    /// <summary>Gauge records.</summary>
    RainRecords Rain { get; }

    /// <summary>How one value came about.</summary>
    /// <param name="areal">What the step gave.</param>
    /// <param name="step">Index of the step of time.</param>
    /// <param name="basin">Index of the basin.</param>
    ArealAccount AccountFor(ArealRainfall areal, int step, int basin);

    /// <summary>What this step, as it is set, gives for other weights and records.</summary>
    /// <param name="weights">Weights of a full network.</param>
    /// <param name="rain">Gauge records.</param>
    ArealRainfall Recompute(WeightTable weights, RainRecords rain);
}
