using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Weights;

/// <summary>
/// Shapes whose weights are plain fractions: <i>source:</i> tests/reference/handbook, constructed there, each computed by
/// two methods.
/// </summary>
public sealed class HandbookTests
{
    public static TheoryData<string> Examples => [.. HandbookExample.Load().Select(example => example.Id)];

    [Theory]
    [MemberData(nameof(Examples))]
    public void Weights_are_the_fractions_of_the_handbook(string id)
    {
        HandbookExample example = HandbookExample.Load().Single(candidate => candidate.Id == id);
        AreaWeights weights = AreaWeights.Of(example.Network.Cells(), Shapes.Batch(example.Rings), 1);
        for (int gauge = 0; gauge < example.Weights.Length; gauge++)
        {
            int row = weights.Sites(0).IndexOf(gauge);
            (row < 0 ? 0 : weights.Weights(0)[row]).ShouldBe(example.Weights[gauge], example.Tolerance, example.Id);
        }

        double area = weights.PolygonArea(0) / (example.Scale * example.Scale);
        area.ShouldBe(example.Area, 1e-12 * example.Area);
        weights.Sites(0).Length.ShouldBe(example.Weights.Count(weight => weight > 0));
    }
}
