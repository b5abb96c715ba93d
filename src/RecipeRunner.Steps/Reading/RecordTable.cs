using System.Globalization;
using nietras.SeparatedValues;
using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading;

/// <summary>Gathers the rows of a record file, in any order, and makes records of unbroken steps of them.</summary>
internal sealed class RecordTable(string file, TimeStep step, DepthReader depths)
{
    private const int LongestYears = 400;

    private readonly LabelReader labels = new(file, step);
    private readonly Dictionary<string, int> gauges = new(StringComparer.Ordinal);
    private readonly Dictionary<LocalDateTime, List<Cell>> rows = [];
    private readonly Dictionary<LocalDateTime, int> lines = [];
    private LocalDateTime? before;
    private int outOfOrder;

    /// <summary>The file.</summary>
    public string File => file;

    /// <summary>What is wrong with it.</summary>
    public Problems Problems { get; } = new();

    /// <summary>Names the gauges of a wide file, a column each after the first.</summary>
    public void SetGauges(ReadOnlySpan<string> ids)
    {
        foreach (var id in ids)
        {
            gauges[id] = gauges.Count;
        }
    }

    /// <summary>Adds a row of a wide file: time, then a cell a gauge.</summary>
    public void AddWide(SepReader.Row row)
    {
        var line = row.LineNumberFrom;
        if (labels.Read(row[0].ToString().Trim(), line, 1, Problems) is not { } label)
        {
            return;
        }

        if (!lines.TryAdd(label, line))
        {
            Problems.Add(
                "RR0255",
                new Place(file, line, 1),
                FormattableString.Invariant($"The time {step.LabelText(label)} stands at line {lines[label]} already."),
                "Take one of the two rows out."
            );
            return;
        }

        SeeOrder(label);
        var cells = new List<Cell>(gauges.Count);
        foreach (var (id, column) in gauges)
        {
            if (
                depths.Read(row[column + 1].Span, line, column + 2, id, step.IntervalOf(label).Hours, Problems) is
                { } depth
            )
            {
                cells.Add(new Cell(column, depth));
            }
        }

        rows[label] = cells;
    }

    /// <summary>Adds a row of a long file: gauge, time, value.</summary>
    public void AddLong(SepReader.Row row)
    {
        var line = row.LineNumberFrom;
        var id = row[0].ToString().Trim();
        if (id.Length == 0)
        {
            Problems.Add("RR0244", new Place(file, line, 1), "The gauge has no id.", "Write the gauge's id.");
            return;
        }

        if (labels.Read(row[1].ToString().Trim(), line, 2, Problems) is not { } label)
        {
            return;
        }

        if (!gauges.TryGetValue(id, out var column))
        {
            column = gauges.Count;
            gauges.Add(id, column);
        }

        if (!rows.TryGetValue(label, out var cells))
        {
            rows.Add(label, cells = []);
        }

        var depth = depths.Read(row[2].Span, line, 3, id, step.IntervalOf(label).Hours, Problems);
        if (!seen.Add((column, label)))
        {
            Problems.Add(
                "RR0255",
                new Place(file, line, 2, $"gauge {id}"),
                FormattableString.Invariant($"It has a value for {step.LabelText(label)} in an earlier line already."),
                "Take one of the two rows out."
            );
        }
        else if (depth is { } known)
        {
            cells.Add(new Cell(column, known));
        }
    }

    private readonly HashSet<(int Column, LocalDateTime Label)> seen = [];

    /// <summary>Makes the records.</summary>
    /// <exception cref="RefusedException">With every problem found.</exception>
    public RainRecords Finish(StepContext context)
    {
        Problems.ThrowIfAny();
        if (rows.Count == 0)
        {
            throw new RefusedException(
                Finding.Error("RR0256", new Place(file), "It has a header but no rows.", "Was the file cut?")
            );
        }

        var span = Span();
        var order = gauges.OrderBy(pair => pair.Key, StringComparer.Ordinal).ToArray();
        var place = new int[order.Length];
        for (var i = 0; i < order.Length; i++)
        {
            place[order[i].Value] = i;
        }

        var values = new double[span.Count * order.Length];
        var statuses = new RecordStatus[values.Length];
        for (var t = 0; t < span.Count; t++)
        {
            foreach (var cell in rows.GetValueOrDefault(span.LabelAt(t)) ?? [])
            {
                var at = (t * order.Length) + place[cell.Gauge];
                values[at] = cell.Depth;
                statuses[at] = RecordStatus.Observed;
            }
        }

        TellOfTimes(context, span);
        var records = new RainRecords([.. order.Select(pair => pair.Key)], span, values, statuses, file);
        RecordFindings.Tell(context, records);
        return records;
    }

    private void SeeOrder(LocalDateTime label)
    {
        outOfOrder += before is { } earlier && label < earlier ? 1 : 0;
        before = label;
    }

    /// <summary>Every label from the first to the last.</summary>
    private Timeline Span()
    {
        var (first, last) = (rows.Keys.Min(), rows.Keys.Max());
        if (Period.Between(first.Date, last.Date, PeriodUnits.Years).Years > LongestYears)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0259",
                    new Place(file),
                    FormattableString.Invariant(
                        $"Its times run from {step.LabelText(first)} to {step.LabelText(last)}, more than {LongestYears} years."
                    ),
                    "Look for a year that was mistyped."
                )
            );
        }

        return new Timeline(step, first, step.StepsBetween(first, last) + 1);
    }

    private void TellOfTimes(StepContext context, Timeline span)
    {
        if (outOfOrder > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0257",
                    new Place(file),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{outOfOrder} rows are earlier than the row before them; they were put in order."
                    ),
                    ""
                )
            );
        }

        var absent = Enumerable
            .Range(0, span.Count)
            .Select(span.LabelAt)
            .Where(label => !rows.ContainsKey(label))
            .ToArray();
        if (absent.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0258",
                    new Place(file),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{absent.Length} steps have no row, the first {step.LabelText(absent[0])}; all gauges count as missing there."
                    ),
                    "Check whether rows were lost."
                )
            );
        }
    }

    private readonly record struct Cell(int Gauge, double Depth);
}
