namespace RecipeRunner.Numerics.Weights;

/// <summary>The rows of some consecutive polygons.</summary>
internal sealed class WeightRows
{
    public List<int> Sites { get; } = [];

    public List<double> Areas { get; } = [];

    public List<double> Weights { get; } = [];

    /// <summary>Where each polygon's rows end.</summary>
    public List<int> Ends { get; } = [];

    public List<double> PolygonAreas { get; } = [];

    public List<PolygonRefusal> Refusals { get; } = [];
}
