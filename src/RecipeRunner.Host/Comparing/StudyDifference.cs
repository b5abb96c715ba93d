using System.Collections.Immutable;

namespace RecipeRunner.Host.Comparing;

/// <summary>Something that one of two studies has and the other has not, or has otherwise.</summary>
/// <param name="Name">What it is: an input file, a setting, a gauge, a basin, a line of the recipe.</param>
/// <param name="Was">What the first study has; empty where it has none.</param>
/// <param name="Is">What the second has; empty where it has none.</param>
public sealed record Change(string Name, string Was, string Is);

/// <summary>How an areal value changed from one study to another, and because of what. The four parts add up to the difference.</summary>
/// <param name="Basin">The basin's id.</param>
/// <param name="Step">The step of time, as tables and traces name it.</param>
/// <param name="WasMillimetres">What the first study has.</param>
/// <param name="IsMillimetres">What the second has.</param>
/// <param name="BySettings">The part due to another gap policy or threshold.</param>
/// <param name="ByWeights">The part due to gauges that moved, came or went in the network, or basins redrawn.</param>
/// <param name="ByReporting">The part due to other gauges reporting at that step.</param>
/// <param name="ByDepths">The part due to depths revised at gauges that report in both.</param>
public sealed record RainChange(
    string Basin,
    string Step,
    double WasMillimetres,
    double IsMillimetres,
    double BySettings,
    double ByWeights,
    double ByReporting,
    double ByDepths
)
{
    /// <summary>By how much the value changed.</summary>
    public double Difference => IsMillimetres - WasMillimetres;
}

/// <summary>What changed from one study to another.</summary>
public sealed record StudyDifference
{
    /// <summary>Tool and its version, where they differ.</summary>
    public ImmutableArray<Change> Tools { get; init; } = [];

    /// <summary>Input files that differ, by their digests.</summary>
    public ImmutableArray<Change> Inputs { get; init; } = [];

    /// <summary>Settings of the recipe that differ.</summary>
    public ImmutableArray<Change> Settings { get; init; } = [];

    /// <summary>Recipe lines that differ: those that went and those that came, by number.</summary>
    public ImmutableArray<Change> RecipeLines { get; init; } = [];

    /// <summary>Gauges that came, went or moved.</summary>
    public ImmutableArray<Change> Gauges { get; init; } = [];

    /// <summary>Basins that came, went or were redrawn.</summary>
    public ImmutableArray<Change> Basins { get; init; } = [];

    /// <summary>Weights of the full network that differ, by basin and gauge.</summary>
    public ImmutableArray<Change> Weights { get; init; } = [];

    /// <summary>Areal values that both studies have and that differ, in the order of basins, then time.</summary>
    public ImmutableArray<RainChange> Rain { get; init; } = [];

    /// <summary>Areal values that both studies have.</summary>
    public int ValuesInBoth { get; init; }

    /// <summary>Areal values that only the first study gives; the other withholds them or has no such step or basin.</summary>
    public int ValuesGone { get; init; }

    /// <summary>Areal values that only the second study gives.</summary>
    public int ValuesNew { get; init; }

    /// <summary>Changed values whose parts cannot be told, because a value is withheld on the way from one study to the other.</summary>
    public int WithoutParts { get; init; }

    /// <summary>Why areal values were not compared; empty where they were.</summary>
    public string NotCompared { get; init; } = "";

    /// <summary>True where nothing differs.</summary>
    public bool IsEmpty =>
        Tools.IsEmpty
        && Inputs.IsEmpty
        && Settings.IsEmpty
        && RecipeLines.IsEmpty
        && Gauges.IsEmpty
        && Basins.IsEmpty
        && Weights.IsEmpty
        && Rain.IsEmpty
        && ValuesGone + ValuesNew + WithoutParts == 0;
}
