namespace RecipeRunner.Model.Steps;

/// <summary>One run of a recipe, as steps and verbs see it.</summary>
public interface IStudy
{
    /// <summary>Runs a step, journals it, and takes its result into the study.</summary>
    /// <typeparam name="T">What the step gives.</typeparam>
    /// <param name="step">The step with its inputs and settings.</param>
    /// <exception cref="RefusedException">The step refuses its input, or an input belongs to another study.</exception>
    T Run<T>(Step<T> step)
        where T : Artifact;

    /// <summary>Sets the title that people see first.</summary>
    void Title(string text);

    /// <summary>Adds a sentence to the summary: a purpose, an assumption, a source line.</summary>
    void Note(string text);

    /// <summary>States where data come from, and under which licence.</summary>
    /// <param name="file">An input file's name; with * or ? in its last part, all input files that fit.</param>
    /// <param name="text">Who made the data and where they were had, in words that a reader can follow.</param>
    /// <param name="licence">The licence: its SPDX identifier, its address, or its words; null where unknown.</param>
    /// <exception cref="RefusedException">The words are missing, or when the run ends: it read no such file.</exception>
    void Source(string file, string text, string? licence);

    /// <summary>The value of a setting: as the person who runs the recipe gave it, or else its default.</summary>
    /// <typeparam name="T"><see cref="string"/>, <see cref="int"/>, <see cref="double"/> or <see cref="bool"/>.</typeparam>
    /// <param name="name">Letters, digits, hyphens and underscores.</param>
    /// <param name="default">The value where none is given.</param>
    /// <exception cref="RefusedException">The value given does not fit, or the recipe asks for the name twice with different defaults.</exception>
    T Setting<T>(string name, T @default)
        where T : notnull;
}
