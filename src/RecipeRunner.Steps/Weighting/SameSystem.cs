using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Refuses to combine layers in different reference systems.</summary>
internal static class SameSystem
{
    /// <summary>Refuses where basins and gauges differ, naming the recipe lines that made them.</summary>
    /// <exception cref="RefusedException">They differ.</exception>
    public static void Require(BasinLayer basins, GaugeNetwork gauges)
    {
        if (basins.ReferenceSystem.IsSameAs(gauges.ReferenceSystem))
        {
            return;
        }

        throw new RefusedException(
            Finding.Error(
                "RR0401",
                new Place(),
                $"The basins are in {basins.ReferenceSystem.Label} ({basins.Lineage?.Line}), the gauges in {gauges.ReferenceSystem.Label} ({gauges.Lineage?.Line}).",
                "Bring both to one working grid with .To(grid)."
            )
        );
    }
}
