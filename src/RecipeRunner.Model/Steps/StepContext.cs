using System.Collections.Immutable;

namespace RecipeRunner.Model.Steps;

/// <summary>The only door out of a step.</summary>
public abstract class StepContext
{
    /// <summary>Set when the person who runs the recipe wants it to stop.</summary>
    public abstract CancellationToken Cancellation { get; }

    /// <summary>True where the data folder holds a file of this name.</summary>
    /// <param name="name">Relative to the data folder, with forward slashes.</param>
    public abstract bool InputExists(string name);

    /// <summary>The files that a name means: the one of that name, or all that fit its last part where that holds * or ?.</summary>
    /// <param name="pattern">Relative to the data folder, with forward slashes; * stands for any letters, ? for one.</param>
    /// <returns>Names in ordinal order, at least one.</returns>
    /// <exception cref="RefusedException">There is none, or the name lies outside the data folder.</exception>
    public abstract ImmutableArray<string> FindInputs(string pattern);

    /// <summary>
    /// Opens an input file for reading and seeking. It is copied into the study and digested first; what is read is the copy.
    /// </summary>
    /// <param name="name">Relative to the data folder, with forward slashes.</param>
    /// <exception cref="RefusedException">There is no such file, or it lies outside the data folder.</exception>
    public abstract Stream OpenInput(string name);

    /// <summary>Creates a file of the study.</summary>
    /// <param name="path"><c>layers/…</c> or <c>tables/…</c>, with forward slashes.</param>
    /// <exception cref="RefusedException">The study has a file of this name already.</exception>
    public abstract Stream CreateOutput(string path);

    /// <summary>Adds a finding to the audit.</summary>
    /// <param name="finding">A notice or a caution; errors are thrown as <see cref="RefusedException"/>.</param>
    public abstract void Find(Finding finding);

    /// <summary>Writes a fact about how the work was done into the journal, such as a datum operation with its accuracy.</summary>
    /// <param name="name">What it is, in a word or two; once a step.</param>
    /// <param name="value">The fact, the same on every machine.</param>
    public abstract void State(string name, string value);

    /// <summary>Says what the result takes for granted; shown in the summary beside the caution.</summary>
    /// <param name="sentence">A whole sentence, the same on every machine.</param>
    public abstract void Assume(string sentence);

    /// <summary>Says how far the work has come.</summary>
    /// <param name="share">0 to 1.</param>
    public abstract void Progress(double share);
}
