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
        if (Count > 0)
        {
            throw ToRefusal();
        }
    }

    /// <summary>The refusal to throw, which counts those that are not listed.</summary>
    /// <exception cref="InvalidOperationException">Nothing was added.</exception>
    public RefusedException ToRefusal()
    {
        if (Count == 0)
        {
            throw new InvalidOperationException("There is no problem to refuse for.");
        }

        return Count == kept.Count
            ? new RefusedException([.. kept])
            : new RefusedException([
                .. kept,
                Finding.Error(
                    kept[0].Code,
                    new Place(kept[0].Where.File),
                    FormattableString.Invariant($"{Count - Limit} further problems are not listed.")
                ),
            ]);
    }
}
