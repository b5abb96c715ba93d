namespace RecipeRunner.Model.Steps;

/// <summary>
/// One operation. Derive an immutable record: its properties that hold artifacts are inputs, the others are settings.
/// The host journals it from that alone.
/// </summary>
/// <typeparam name="T">What the step gives.</typeparam>
public abstract record Step<T>
    where T : Artifact
{
    /// <summary>Does the work. Same inputs and settings must give the same result, bit for bit.</summary>
    /// <param name="context">The only door out: files, findings, progress, cancellation.</param>
    /// <returns>A new artifact.</returns>
    /// <exception cref="RefusedException">The input cannot be used.</exception>
    public abstract T Execute(StepContext context);
}

/// <summary>Names a step for the journal and the reference.</summary>
/// <param name="title">What it does, in two or three words.</param>
[AttributeUsage(AttributeTargets.Class, Inherited = false)]
public sealed class StepAttribute(string title) : Attribute
{
    /// <summary>What it does, in two or three words.</summary>
    public string Title { get; } = title;

    /// <summary>One word for the line that a run prints; the first word of the title where not given.</summary>
    public string Word { get; init; } = title.Split(' ')[0].ToLowerInvariant();

    /// <summary>The published source of the method, where it has one.</summary>
    public string Source { get; init; } = "";
}
