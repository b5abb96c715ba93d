using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>A total that a file gives for several steps.</summary>
/// <param name="Gauge">Index of the gauge.</param>
/// <param name="LastStep">Index of the step at which it was read.</param>
/// <param name="Steps">How many steps it covers; 1 where the file does not say.</param>
/// <param name="Depth">Millimetres; null where it cannot be used.</param>
/// <param name="Line">Its line.</param>
internal readonly record struct SpanTotal(int Gauge, int LastStep, int Steps, double? Depth, int Line);

/// <summary>What one file holds, before it is joined to others and becomes records.</summary>
/// <param name="File">The file.</param>
/// <param name="GaugeIds">The gauges in ordinal order.</param>
/// <param name="Times">Every step from the first to the last of the file.</param>
/// <param name="Depths">Millimetres, step after step, a value a gauge.</param>
/// <param name="Statuses">
/// What is known of each. <see cref="RecordStatus.Accumulated"/> says that the rain is in the gauge's next value.
/// </param>
/// <param name="Totals">Totals of several steps; their steps are missing in <paramref name="Statuses"/>.</param>
/// <param name="Lines">Where each value stands in the file.</param>
internal sealed record RecordPart(
    string File,
    string[] GaugeIds,
    Timeline Times,
    double[] Depths,
    RecordStatus[] Statuses,
    List<SpanTotal> Totals,
    SourceLines Lines
)
{
    /// <summary>The line from which a value comes; 0 where the file has none.</summary>
    /// <param name="gauge">The gauge's id.</param>
    /// <param name="label">The label of the step.</param>
    public int LineOf(string gauge, LocalDateTime label)
    {
        var column = Array.BinarySearch(GaugeIds, gauge, StringComparer.Ordinal);
        return column >= 0 && Times.IndexOf(label) is { } step ? Lines.LineOf(step, column) : 0;
    }
}

/// <summary>The lines of a file from which values come: a line a step where rows are wide, a line a value where they are long.</summary>
/// <param name="Lines">Lines from 1; 0 where the file has none.</param>
/// <param name="Gauges">The number of gauges.</param>
/// <param name="IsWide">True where there is one line a step.</param>
internal sealed record SourceLines(int[] Lines, int Gauges, bool IsWide)
{
    /// <summary>The line of a value; 0 where the file has none.</summary>
    public int LineOf(int step, int gauge) => Lines[IsWide ? step : (step * Gauges) + gauge];

    /// <summary>True where the file has any row for a step.</summary>
    public bool HasRow(int step) => IsWide ? Lines[step] > 0 : Lines.AsSpan(step * Gauges, Gauges).ContainsAnyExcept(0);
}
