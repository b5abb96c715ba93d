using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Series;

/// <summary>Lays out what every areal value rests on: gauges reporting, share of weight, distance to the nearest.</summary>
/// <param name="Areal">Mean areal rainfall.</param>
/// <example><code>EmitTable(areal.Coverage(), "coverage");</code></example>
[Step("Coverage", Word = "coverage")]
public sealed record CoverageStep(ArealRainfall Areal) : Step<CoverageTable>
{
    /// <inheritdoc/>
    public override CoverageTable Execute(StepContext context) => new(Areal);
}

/// <summary>The verb for <see cref="CoverageStep"/>.</summary>
public static class CoverageVerb
{
    /// <inheritdoc cref="CoverageStep"/>
    /// <param name="areal">Mean areal rainfall.</param>
    public static CoverageTable Coverage(this ArealRainfall areal) => areal.Run(new CoverageStep(areal));
}
