namespace RecipeRunner.Host.Running;

/// <summary>Where data come from, as the recipe states it.</summary>
/// <param name="File">An input file's name, or a pattern that input files fit.</param>
/// <param name="Text">Who made the data and where they were had.</param>
/// <param name="Licence">The licence; null where the recipe states none.</param>
/// <param name="Inputs">The input files that it speaks of, relative to the payload, in ordinal order; at least one.</param>
public sealed record DataSource(
    string File,
    string Text,
    string? Licence,
    System.Collections.Immutable.ImmutableArray<string> Inputs
);
