using System.Collections.Immutable;

namespace RecipeRunner.Host.Scripting;

/// <summary>A recipe was refused, failed, or met data that a step refuses.</summary>
public sealed class RecipeException : Exception
{
    /// <summary>Creates the exception.</summary>
    /// <param name="problems">At least one, the first cause first.</param>
    /// <param name="cause">What was thrown, where something was.</param>
    public RecipeException(ImmutableArray<RecipeProblem> problems, Exception? cause = null)
        : base(problems[0].Problem.What, cause) => Problems = problems;

    /// <summary>The problems, the first cause first.</summary>
    public ImmutableArray<RecipeProblem> Problems { get; }
}
