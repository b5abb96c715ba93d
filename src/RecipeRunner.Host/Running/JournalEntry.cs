using System.Collections.Immutable;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Running;

/// <summary>An artifact that a step took.</summary>
/// <param name="Name">The step's name for it.</param>
/// <param name="Entry">The journal entry that made it.</param>
/// <param name="Digest">Its digest.</param>
public sealed record StepInput(string Name, int Entry, string Digest);

/// <summary>One step that ran.</summary>
public sealed record JournalEntry
{
    /// <summary>Its number, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>The step's title.</summary>
    public required string Title { get; init; }

    /// <summary>One word for it.</summary>
    public required string Word { get; init; }

    /// <summary>The published source of the method; empty where there is none.</summary>
    public required string Source { get; init; }

    /// <summary>The step's type, with its namespace.</summary>
    public required string StepType { get; init; }

    /// <summary>The library that holds the step, with its version.</summary>
    public required string Library { get; init; }

    /// <summary>The recipe line that asked for it.</summary>
    public required RecipeLine Line { get; init; }

    /// <summary>The settings that it was given: name and text, in the step's order.</summary>
    public required ImmutableArray<(string Name, string Text)> Settings { get; init; }

    /// <summary>The artifacts that it took, in the step's order.</summary>
    public required ImmutableArray<StepInput> Inputs { get; init; }

    /// <summary>The step itself.</summary>
    public required object Step { get; init; }

    /// <summary>What it gave.</summary>
    public required Artifact Output { get; init; }

    /// <summary>Facts that it stated: name and value, in order.</summary>
    public required ImmutableArray<(string Name, string Value)> Statements { get; init; }

    /// <summary>What its result takes for granted, in order.</summary>
    public required ImmutableArray<string> Assumptions { get; init; }

    /// <summary>What it found, in order.</summary>
    public required ImmutableArray<Finding> Findings { get; init; }

    /// <summary>Input files that it read, by name, in order.</summary>
    public required ImmutableArray<string> FilesRead { get; init; }

    /// <summary>Files that it wrote, relative to the payload, in order.</summary>
    public required ImmutableArray<string> FilesWritten { get; init; }
}
