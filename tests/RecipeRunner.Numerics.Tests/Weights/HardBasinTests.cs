using CsCheck;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Testing.Oracles;

namespace RecipeRunner.Numerics.Tests.Weights;

/// <summary>What must hold for every basin over every network; areas against half-plane clipping, the oracle's own.</summary>
public sealed class HardBasinTests
{
    [Fact]
    public void Any_basin_over_any_network_is_weighed_as_by_clipping() =>
        Gen.Select(Network.Any, Basin.Any)
            .Sample(
                (network, how) =>
                {
                    if (Basin.For(network, how.Kind, how.Size, how.Seed) is not { } basin || basin.IsTooThin)
                    {
                        return;
                    }

                    AreaWeights weights = AreaWeights.Of(network.Cells(), basin.Batch, 1);
                    WeightsOracle.CheckSums(weights);
                    // A wall is where it is within a few roundings of the distance to its sites.
                    double tolerance = 1e-13 + (1e-14 * basin.ReachIn(network) * basin.Perimeter / basin.Area);
                    WeightsOracle.CheckAgainstClipping(network.X, network.Y, basin.Rings, weights, 0, tolerance);
                },
                iter: 6000
            );
}
