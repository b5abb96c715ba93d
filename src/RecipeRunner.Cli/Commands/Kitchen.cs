using System.Reflection;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Steps;

namespace RecipeRunner.Cli.Commands;

/// <summary>Where the parts are put together: the host runs recipes, the step library says what they can say.</summary>
internal static class Kitchen
{
    /// <summary>The assemblies whose steps and verbs a recipe may use.</summary>
    public static Assembly StepLibrary { get; } = typeof(RecipeVerbs).Assembly;

    /// <summary>The language of recipes.</summary>
    public static RecipeLanguage Language { get; } =
        new(
            typeof(RecipeVerbs),
            study => new RecipeVerbs(study),
            [StepLibrary],
            [
                "System",
                "System.Collections.Generic",
                "System.Linq",
                "RecipeRunner.Model.Rain",
                "RecipeRunner.Model.Space",
                "RecipeRunner.Model.Time",
                "RecipeRunner.Model.Weights",
                "RecipeRunner.Steps.Emitting",
                "RecipeRunner.Steps.Reading",
                "RecipeRunner.Steps.Referencing",
                "RecipeRunner.Steps.Answers",
                "RecipeRunner.Steps.Records",
                "RecipeRunner.Steps.Series",
                "RecipeRunner.Steps.Weighting",
            ]
        );
}
