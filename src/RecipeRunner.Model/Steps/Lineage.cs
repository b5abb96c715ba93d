namespace RecipeRunner.Model.Steps;

/// <summary>Where an artifact comes from.</summary>
/// <param name="Study">The study that made it.</param>
/// <param name="Entry">The number of the journal entry, from 1.</param>
/// <param name="Line">The recipe line that asked for it.</param>
public sealed record Lineage(IStudy Study, int Entry, RecipeLine Line);

/// <summary>A place in a recipe or in a file that it loads.</summary>
/// <param name="File">The file, as the recipe's folder names it.</param>
/// <param name="Line">The line, from 1; 0 where unknown.</param>
/// <param name="Column">The column, from 1; 0 where unknown.</param>
public readonly record struct RecipeLine(string File, int Line, int Column)
{
    /// <inheritdoc/>
    public override string ToString() => FormattableString.Invariant($"{File} line {Line}");
}
