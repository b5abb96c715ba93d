namespace RecipeRunner.Model.Steps;

/// <summary>Collects the problems of one input so that all can be reported at once, up to a sensible number.</summary>
public sealed class Problems
{
    /// <summary>How many are kept; what comes later is only counted.</summary>
    public const int Limit = 12;

    private readonly List<Finding> kept = [];

    /// <summary>How many were added, kept or not.</summary>
    public int Count { get; private set; }

    /// <summary>Adds an error.</summary>
    public void Add(string code, Place where, string what, string mend = "")
    {
        Count++;
        if (kept.Count < Limit)
        {
            kept.Add(Finding.Error(code, where, what, mend));
        }
    }

    /// <summary>Refuses the input where anything was added.</summary>
    /// <exception cref="RefusedException">Something was added.</exception>
    public void ThrowIfAny()
    {
        if (Count == 0)
        {
            return;
        }

        if (Count > kept.Count)
        {
            var first = kept[0];
            kept.Add(
                Finding.Error(
                    first.Code,
                    new Place(first.Where.File),
                    FormattableString.Invariant($"{Count - Limit} further problems are not listed.")
                )
            );
        }

        throw new RefusedException([.. kept]);
    }
}
