using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>Looks at why something was refused.</summary>
internal static class Refusals
{
    /// <summary>The first problem of the refusal that an action must end in.</summary>
    public static Finding Of(Action action) => Should.Throw<RefusedException>(action).Problems[0];
}
