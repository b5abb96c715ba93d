using System.Collections.Immutable;
using System.Reflection;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Scripting;

/// <summary>What a recipe may say: handed to the host by whoever puts the parts together.</summary>
/// <param name="VerbsType">The class whose public members are the top-level verbs.</param>
/// <param name="CreateVerbs">Makes the verbs for one study; of type <paramref name="VerbsType"/>.</param>
/// <param name="StepLibraries">The assemblies whose steps and extension verbs a recipe may use.</param>
/// <param name="Imports">The namespaces that a recipe need not name.</param>
public sealed record RecipeLanguage(
    Type VerbsType,
    Func<IStudy, object> CreateVerbs,
    ImmutableArray<Assembly> StepLibraries,
    ImmutableArray<string> Imports
);
