using NodaTime;

namespace RecipeRunner.Model.Time;

/// <summary>Unbroken steps of time, the first named by its label.</summary>
/// <param name="Step">The steps.</param>
/// <param name="First">The label of the first.</param>
/// <param name="Count">How many there are, 1 or more.</param>
public sealed record Timeline(TimeStep Step, LocalDateTime First, int Count)
{
    /// <summary>The label of the last step.</summary>
    public LocalDateTime Last => LabelAt(Count - 1);

    /// <summary>The label of a step as a file or table writes it.</summary>
    /// <param name="step">Its index.</param>
    public string TextAt(int step) => Step.LabelText(LabelAt(step));

    /// <summary>The label of a step.</summary>
    /// <param name="step">Its index.</param>
    public LocalDateTime LabelAt(int step) => Step.After(First, step);

    /// <summary>The interval of a step.</summary>
    /// <param name="step">Its index.</param>
    public RainInterval IntervalAt(int step) => Step.IntervalOf(LabelAt(step));

    /// <summary>The date to which a step belongs when steps are summed over months or years.</summary>
    /// <param name="step">Its index.</param>
    public LocalDate DateAt(int step) => Step.DateOf(LabelAt(step));

    /// <summary>The index of a label; null where it lies outside.</summary>
    /// <param name="label">A label of the same steps.</param>
    public int? IndexOf(LocalDateTime label)
    {
        var index = Step.StepsBetween(First, label);
        return index >= 0 && index < Count && LabelAt(index) == label ? index : null;
    }

    /// <summary>Some of the steps.</summary>
    /// <param name="first">Index of the first.</param>
    /// <param name="count">How many, 1 or more.</param>
    public Timeline Slice(int first, int count) => new(Step, LabelAt(first), count);

    /// <summary>First and last label, such as <c>2024-01-01 to 2024-01-31</c>.</summary>
    public override string ToString() => $"{TextAt(0)} to {TextAt(Count - 1)}";
}
