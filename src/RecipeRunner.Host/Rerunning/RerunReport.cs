using System.Collections.Immutable;
using RecipeRunner.Host.Signing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>What a rerun came to.</summary>
public enum Verdict
{
    /// <summary>Every file that does not tell of the clock has the same bytes.</summary>
    Identical,

    /// <summary>Bytes differ, but every number agrees within the tolerance.</summary>
    SameValues,

    /// <summary>Numbers, texts or shapes differ.</summary>
    Differs,

    /// <summary>The study is not whole, or its recipe fails.</summary>
    CannotRerun,
}

/// <summary>A value that a study holds and its rerun does not.</summary>
/// <param name="File">The layer or table, relative to the payload.</param>
/// <param name="Row">The row or feature.</param>
/// <param name="Column">The column or coordinate.</param>
/// <param name="Was">What the study holds; null where it has no such value.</param>
/// <param name="Is">What the rerun gives; null where it has no such value.</param>
/// <param name="Difference">By how much, relative to the larger of the two; infinite where one is no number.</param>
public sealed record ValueDifference(
    string File,
    string Row,
    string Column,
    string? Was,
    string? Is,
    double Difference
);

/// <summary>The verdict on a study, and the reasons for it.</summary>
public sealed record RerunReport
{
    /// <summary>Differences relative to the larger of two numbers up to this are the last bits of other machines' arithmetic.</summary>
    public const double Tolerance = 1e-9;

    /// <summary>The verdict.</summary>
    public required Verdict Verdict { get; init; }

    /// <summary>The study's title; empty where it could not be read.</summary>
    public string Title { get; init; } = "";

    /// <summary>The tool that made the study; empty where it could not be read.</summary>
    public string MadeWith { get; init; } = "";

    /// <summary>Who signed the study; null where nobody did, or where it cannot be rerun.</summary>
    public Signer? Signer { get; init; }

    /// <summary>What kept it from being rerun.</summary>
    public ImmutableArray<Finding> Problems { get; init; } = [];

    /// <summary>The first step at which the runs part; null where none does.</summary>
    public HeldStep? FirstStep { get; init; }

    /// <summary>How many files were compared and how many have the same bytes.</summary>
    public (int Same, int Compared) Files { get; init; }

    /// <summary>How many steps are the same before the first that is not.</summary>
    public int StepsAlike { get; init; }

    /// <summary>Files whose bytes differ, relative to the payload.</summary>
    public ImmutableArray<string> DifferingFiles { get; init; } = [];

    /// <summary>The largest difference that is no larger than the tolerance; null where there is none.</summary>
    public ValueDifference? LargestWithin { get; init; }

    /// <summary>The worst differences beyond the tolerance, the largest first.</summary>
    public ImmutableArray<ValueDifference> Worst { get; init; } = [];

    /// <summary>How many values differ beyond the tolerance.</summary>
    public int BeyondCount { get; init; }
}
