using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>What marks in a flag column say of the value beside them: <c>flags: [Flag.Failed("X", "Q"), Flag.Estimated("E")]</c>.</summary>
public sealed record Flag : ISettingValue
{
    private Flag(RecordStatus meaning, string[] marks) => (Meaning, Marks) = (meaning, [.. marks]);

    /// <summary>What the marks say.</summary>
    public RecordStatus Meaning { get; }

    /// <summary>The marks, as the column writes them.</summary>
    public ImmutableArray<string> Marks { get; }

    /// <summary>Marks that say nothing against a value.</summary>
    public static Flag Good(params string[] marks) => new(RecordStatus.Observed, marks);

    /// <summary>Marks of a value that is none.</summary>
    public static Flag Missing(params string[] marks) => new(RecordStatus.Missing, marks);

    /// <summary>Marks of rain too little to measure.</summary>
    public static Flag Trace(params string[] marks) => new(RecordStatus.Trace, marks);

    /// <summary>Marks of a value that was worked out from others.</summary>
    public static Flag Estimated(params string[] marks) => new(RecordStatus.Estimated, marks);

    /// <summary>Marks of a step whose rain is in the gauge's next value.</summary>
    public static Flag Accumulating(params string[] marks) => new(RecordStatus.Accumulated, marks);

    /// <summary>Marks of a value that failed a check of quality.</summary>
    public static Flag Failed(params string[] marks) => new(RecordStatus.Failed, marks);

    /// <inheritdoc/>
    public string ToSettingText() =>
        $"{string.Join("/", Marks)} = {(Meaning == RecordStatus.Observed ? "good" : Meaning.Word())}";

    /// <inheritdoc/>
    public override string ToString() => ToSettingText();
}
