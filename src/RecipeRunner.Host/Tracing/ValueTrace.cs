using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Host.Tracing;

/// <summary>Where the depth of one gauge came from.</summary>
/// <param name="Gauge">The gauge's id.</param>
/// <param name="Steps">The steps that the value passed, the last first; the reading step is the last of them.</param>
/// <param name="Cells">The cells of input files; none where the reading step cannot say.</param>
public sealed record DepthOrigin(string Gauge, ImmutableArray<JournalEntry> Steps, ImmutableArray<FileValue> Cells);

/// <summary>One areal value, followed back to the lines of the input files.</summary>
public sealed record ValueTrace
{
    /// <summary>The study's title.</summary>
    public required string Title { get; init; }

    /// <summary>The basin's id.</summary>
    public required string Basin { get; init; }

    /// <summary>The basin's name.</summary>
    public required string BasinName { get; init; }

    /// <summary>The basin's area in square metres.</summary>
    public required double AreaSquareMetres { get; init; }

    /// <summary>When the rain fell.</summary>
    public required RainInterval Interval { get; init; }

    /// <summary>The value.</summary>
    public required ArealValue Value { get; init; }

    /// <summary>What it was made of.</summary>
    public required ArealAccount Account { get; init; }

    /// <summary>The steps behind it, the last first.</summary>
    public required ImmutableArray<JournalEntry> Steps { get; init; }

    /// <summary>Where the depths came from, in the account's order.</summary>
    public required ImmutableArray<DepthOrigin> Origins { get; init; }

    /// <summary>Layers of the study in which the weights can be seen, relative to the payload.</summary>
    public required ImmutableArray<string> Layers { get; init; }
}
