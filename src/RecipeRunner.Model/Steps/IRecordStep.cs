using System.Collections.Immutable;
using RecipeRunner.Model.Rain;

namespace RecipeRunner.Model.Steps;

/// <summary>Where a value of records comes from.</summary>
public abstract record ValueOrigin;

/// <summary>A value of other records, in this study.</summary>
/// <param name="Records">The records.</param>
/// <param name="Gauge">Index of the gauge.</param>
/// <param name="Step">Index of the step of time.</param>
public sealed record EarlierValue(RainRecords Records, int Gauge, int Step) : ValueOrigin;

/// <summary>A cell of an input file.</summary>
/// <param name="Where">The file, line and column.</param>
/// <param name="Text">What stands there.</param>
public sealed record FileValue(Place Where, string Text) : ValueOrigin;

/// <summary>A step that gives records and can say where each of their values comes from.</summary>
public interface IRecordStep
{
    /// <summary>Where one value comes from: one place or several; none where nothing is known of it.</summary>
    /// <param name="records">What the step gave.</param>
    /// <param name="gauge">Index of the gauge.</param>
    /// <param name="step">Index of the step of time.</param>
    /// <param name="context">Opens the step's input files again.</param>
    ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context);
}
