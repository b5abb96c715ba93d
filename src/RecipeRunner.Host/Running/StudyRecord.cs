using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Running;

/// <summary>A file of the study with what the seal says of it.</summary>
/// <param name="Path">Relative to the study's payload, with forward slashes.</param>
/// <param name="Bytes">Its size.</param>
/// <param name="Sha256">Its digest, lower-case hexadecimal.</param>
/// <param name="IsHeld">False for an input that the study names by digest and size without holding it.</param>
public sealed record FileRecord(string Path, long Bytes, string Sha256, bool IsHeld = true)
{
    /// <summary>The path within its folder of the payload: for an input, the name by which the recipe reads it.</summary>
    public string Name => Path[(Path.IndexOf('/', StringComparison.Ordinal) + 1)..];
}

/// <summary>A setting as it was used.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Value">Its value as text.</param>
/// <param name="IsDefault">True where nobody gave one.</param>
public sealed record SettingUsed(string Name, string Value, bool IsDefault);

/// <summary>Everything that a run did: what the audit and the summary are written from.</summary>
public sealed record StudyRecord
{
    /// <summary>The title that the recipe gave, or its name.</summary>
    public required string Title { get; init; }

    /// <summary>The recipe's notes, in order.</summary>
    public required ImmutableArray<string> Notes { get; init; }

    /// <summary>The recipe's file name.</summary>
    public required string RecipeName { get; init; }

    /// <summary>Settings, in the order in which the recipe first asked.</summary>
    public required ImmutableArray<SettingUsed> Settings { get; init; }

    /// <summary>The steps, in the order in which they ran.</summary>
    public required ImmutableArray<JournalEntry> Journal { get; init; }

    /// <summary>Recipe files, in ordinal order of their paths.</summary>
    public required ImmutableArray<FileRecord> RecipeFiles { get; init; }

    /// <summary>Input files, in ordinal order of their paths.</summary>
    public required ImmutableArray<FileRecord> Inputs { get; init; }

    /// <summary>Where the data come from, as the recipe states it, in its order.</summary>
    public required ImmutableArray<DataSource> Sources { get; init; }

    /// <summary>Inputs of more bytes than this are listed, not held; null where all are held.</summary>
    public required long? ListInputsAbove { get; init; }

    /// <summary>Layers and tables, in ordinal order of their paths.</summary>
    public required ImmutableArray<FileRecord> Outputs { get; init; }

    /// <summary>What the results take for granted, each said once, in the order of the steps.</summary>
    public ImmutableArray<string> Assumptions =>
        [.. Journal.SelectMany(entry => entry.Assumptions).Distinct(StringComparer.Ordinal)];

    /// <summary>Findings of all steps, each said once, worst first, within a severity in the order of the steps.</summary>
    public ImmutableArray<Finding> Findings =>
        [.. Journal.SelectMany(entry => entry.Findings).Distinct().OrderByDescending(finding => finding.Severity)];

    /// <summary>The weights that the first areal rainfall rests on, or else the first that were made; null where there are none.</summary>
    public WeightTable? MainWeights => BehindRain<WeightTable>() ?? Results<WeightTable>().FirstOrDefault();

    /// <summary>The records that the first areal rainfall rests on, or else the last that were made; null where there are none.</summary>
    public RainRecords? MainRecords => BehindRain<RainRecords>() ?? Results<RainRecords>().LastOrDefault();

    /// <summary>The results of the steps that are of one kind, in order.</summary>
    /// <typeparam name="T">The kind of artifact.</typeparam>
    public IEnumerable<T> Results<T>()
        where T : Artifact => Journal.Select(entry => entry.Output).OfType<T>();

    private T? BehindRain<T>()
        where T : Artifact =>
        Journal
            .FirstOrDefault(entry => entry.Output is ArealRainfall)
            ?.Inputs.Select(input => Journal[input.Entry - 1].Output)
            .OfType<T>()
            .FirstOrDefault();
}
