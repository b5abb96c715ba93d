using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Refuses to combine layers in different reference systems.</summary>
internal static class SameSystem
{
    /// <summary>Refuses where the two differ, naming the recipe lines that made them.</summary>
    /// <exception cref="RefusedException">They differ.</exception>
    public static void Require(
        Artifact first,
        ReferenceSystem firstSystem,
        Artifact second,
        ReferenceSystem secondSystem
    )
    {
        if (firstSystem.IsSameAs(secondSystem))
        {
            return;
        }

        throw new RefusedException(
            Finding.Error(
                "RR0401",
                new Place(),
                $"The basins are in {firstSystem.Label} ({first.Lineage?.Line}), the gauges in {secondSystem.Label} ({second.Lineage?.Line}).",
                "Bring both to one working grid with .To(grid)."
            )
        );
    }
}
