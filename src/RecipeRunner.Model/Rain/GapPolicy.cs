namespace RecipeRunner.Model.Rain;

/// <summary>What to do at a time step where a gauge is missing.</summary>
public enum GapPolicy
{
    /// <summary>Weights from only those gauges that report: the Thiessen cells are drawn anew.</summary>
    Redraw,

    /// <summary>Keep the weights of the full network and divide by the share that reports.</summary>
    Rescale,

    /// <summary>No value where any gauge with weight is missing.</summary>
    Withhold,
}
