using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>
/// The values of a wide file, each row laid at once where its step belongs, so that rows in order without holes are never
/// moved again. Rows of steps that the file lacks stay missing.
/// </summary>
internal sealed class WideGrid
{
    private readonly string file;
    private readonly TimeStep step;
    private readonly string[] gaugeIds;
    private readonly RecordSpan span;
    private double[] depths;
    private RecordStatus[] statuses;
    private int[] lines;
    private int lowest;
    private LocalDateTime? before;

    /// <summary>Creates an empty grid.</summary>
    /// <param name="file">The file.</param>
    /// <param name="step">The steps of time.</param>
    /// <param name="gaugeIds">The gauges in ordinal order.</param>
    /// <param name="rows">How many rows are expected.</param>
    public WideGrid(string file, TimeStep step, string[] gaugeIds, int rows)
    {
        (this.file, this.step, this.gaugeIds) = (file, step, gaugeIds);
        span = new RecordSpan(file, step);
        depths = new double[(long)rows * gaugeIds.Length];
        statuses = new RecordStatus[depths.LongLength];
        lines = new int[rows];
    }

    /// <summary>How many rows are earlier than the row before them.</summary>
    public int OutOfOrder { get; private set; }

    /// <summary>Makes room for a row.</summary>
    /// <param name="label">The label of its step.</param>
    /// <param name="place">Its line, and the column of its time.</param>
    /// <param name="problems">Takes what is wrong.</param>
    /// <returns>Where its values begin; null where it cannot be taken.</returns>
    public int? RowAt(LocalDateTime label, (int Line, int Column) place, Problems problems)
    {
        if (span.Offset(label, place.Line, gaugeIds.Length, problems) is not { } offset)
        {
            return null;
        }

        Hold();
        var row = offset - lowest;
        if (lines[row] > 0)
        {
            problems.Add(
                "RR0255",
                new Place(file, place.Line, place.Column),
                FormattableString.Invariant($"The time {step.LabelText(label)} stands at line {lines[row]} already."),
                SummerTime.DuplicateMend(step, label)
            );
            return null;
        }

        OutOfOrder += before is { } earlier && label < earlier ? 1 : 0;
        before = label;
        lines[row] = place.Line;
        return row * gaugeIds.Length;
    }

    /// <summary>Lays down a value.</summary>
    /// <param name="at">Where.</param>
    /// <param name="cell">What the file says.</param>
    public void Set(int at, Cell cell)
    {
        depths[at] = cell.Depth;
        statuses[at] = cell.Status;
    }

    /// <summary>What the file holds.</summary>
    /// <exception cref="RefusedException">There was no row.</exception>
    public RecordPart Finish()
    {
        span.RequireRows();
        if (span.Count != lines.Length)
        {
            Move(span.Lowest, span.Count);
        }

        return new RecordPart(
            file,
            gaugeIds,
            span.Times,
            depths,
            statuses,
            [],
            new SourceLines(lines, gaugeIds.Length, IsWide: true)
        );
    }

    /// <summary>Widens the window over the steps where it does not hold all of them; at the end at which rows come in.</summary>
    private void Hold()
    {
        if (span.Lowest < lowest)
        {
            var rows = Math.Max(
                lines.Length,
                span.Count > lines.Length ? Math.Max(span.Count, lines.Length + (lines.Length / 2)) : 0
            );
            Move(span.Highest - rows + 1, rows);
        }
        else if (span.Highest >= lowest + lines.Length)
        {
            Move(span.Lowest, Math.Max(span.Count, lines.Length + (lines.Length / 2)));
        }
    }

    private void Move(int newLowest, int rows)
    {
        var (from, to) = (Math.Max(lowest, newLowest), Math.Min(lowest + lines.Length, newLowest + rows));
        var count = Math.Max(0, to - from);
        lines = Moved(lines, from - lowest, from - newLowest, count, rows, 1);
        depths = Moved(depths, from - lowest, from - newLowest, count, rows, gaugeIds.Length);
        statuses = Moved(statuses, from - lowest, from - newLowest, count, rows, gaugeIds.Length);
        lowest = newLowest;
    }

    private static T[] Moved<T>(T[] old, int from, int to, int count, int rows, int width)
    {
        var moved = new T[(long)rows * width];
        old.AsSpan(from * width, count * width).CopyTo(moved.AsSpan(to * width));
        return moved;
    }
}
