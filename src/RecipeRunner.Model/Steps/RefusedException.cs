using System.Collections.Immutable;

namespace RecipeRunner.Model.Steps;

/// <summary>Ends a run because of its input or its recipe, with every problem that could be known at once.</summary>
public sealed class RefusedException : Exception
{
    /// <summary>Refuses for one reason.</summary>
    public RefusedException(Finding problem)
        : this([problem]) { }

    /// <summary>Refuses for several reasons, the first cause first.</summary>
    /// <param name="problems">At least one.</param>
    public RefusedException(ImmutableArray<Finding> problems)
        : base(
            string.Join(
                " ",
                problems.Select(problem => $"{problem.Code} {problem.Where}: {problem.What} {problem.Mend}".TrimEnd())
            )
        ) => Problems = problems;

    /// <summary>The reasons, the first cause first.</summary>
    public ImmutableArray<Finding> Problems { get; }
}
