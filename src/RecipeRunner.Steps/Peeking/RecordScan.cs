using System.Globalization;
using nietras.SeparatedValues;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Records;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>
/// Takes the values of a table as they are, in the file's own unit, and counts what a reader would refuse: values that stand
/// twice, values below zero, texts that are neither number nor usual mark.
/// </summary>
internal sealed class RecordScan
{
    private readonly string[] ids;
    private readonly Dictionary<string, int> gaugeAt;
    private readonly PeekForm form;
    private readonly Timeline times;
    private readonly double[] depths;
    private readonly RecordStatus[] statuses;
    private readonly int[] lines;
    private readonly SortedDictionary<string, int> marks = new(StringComparer.Ordinal);
    private readonly SortedDictionary<string, int> texts = new(StringComparer.Ordinal);

    /// <summary>Creates a scan.</summary>
    /// <param name="ids">The gauges, in ordinal order.</param>
    /// <param name="form">The columns.</param>
    /// <param name="times">The steps.</param>
    public RecordScan(string[] ids, PeekForm form, Timeline times)
    {
        (this.ids, this.form, this.times) = (ids, form, times);
        gaugeAt = ids.Select((id, at) => (id, at))
            .ToDictionary(pair => pair.id, pair => pair.at, StringComparer.Ordinal);
        depths = new double[(long)ids.Length * times.Count];
        statuses = new RecordStatus[depths.Length];
        lines = new int[depths.Length];
    }

    /// <summary>What stands twice; empty where nothing does.</summary>
    public string Twice { get; private set; } = "";

    /// <summary>How many values stand where one stands already.</summary>
    public int TwiceCount { get; private set; }

    /// <summary>The first value below zero that is no usual mark; empty where there is none.</summary>
    public string Negative { get; private set; } = "";

    /// <summary>How many there are.</summary>
    public int NegativeCount { get; private set; }

    /// <summary>Usual marks of a missing value or a trace, with their number.</summary>
    public IReadOnlyDictionary<string, int> Marks => marks;

    /// <summary>Other texts in cells of values, with their number.</summary>
    public IReadOnlyDictionary<string, int> Texts => texts;

    /// <summary>Takes in a row.</summary>
    /// <param name="row">The row.</param>
    /// <param name="gauges">For each column of values the gauge; empty where the row names it.</param>
    public void Add(SepReader.Row row, string[] gauges)
    {
        if (
            row.ColCount <= form.Time
            || !TimeText.TryRead(row[form.Time].Span.Trim(), out var time)
            || times.Step.LabelOf(time.Time) is not { } label
            || times.IndexOf(label) is not { } step
        )
        {
            return;
        }

        for (var i = 0; i < form.Values.Length && form.Values[i] < row.ColCount; i++)
        {
            var id = form.Gauge < 0 ? gauges[i] : row[form.Gauge].Span.Trim().ToString();
            Take(row[form.Values[i]].Span.Trim(), gaugeAt[id], step, CsvText.LineOf(row));
        }
    }

    /// <summary>The values as records, the first where several stand.</summary>
    /// <param name="name">The file.</param>
    public RainRecords Records(string name) => new([.. ids], times, depths, statuses, name);

    private void Take(ReadOnlySpan<char> cell, int gauge, int step, int line)
    {
        var at = (step * ids.Length) + gauge;
        if (lines[at] > 0)
        {
            Twice =
                TwiceCount++ == 0
                    ? $"{ids[gauge]} at {times.TextAt(step)} in lines {lines[at].ToString(CultureInfo.InvariantCulture)} and {line.ToString(CultureInfo.InvariantCulture)}"
                    : Twice;
            return;
        }

        lines[at] = line;
        if (cell.IsEmpty)
        {
            return;
        }

        if (UsualMarks.IsMissing(cell))
        {
            Count(marks, cell);
        }
        else if (UsualMarks.IsTrace(cell))
        {
            Count(marks, cell);
            statuses[at] = RecordStatus.Trace;
        }
        else if (!NumberText.TryRead(cell, out var value))
        {
            Count(texts, cell);
        }
        else if (value < 0)
        {
            Negative = NegativeCount++ == 0 ? $"{cell} at {ids[gauge]}, {times.TextAt(step)}" : Negative;
        }
        else
        {
            (depths[at], statuses[at]) = (value, RecordStatus.Observed);
        }
    }

    private static void Count(SortedDictionary<string, int> counts, ReadOnlySpan<char> text)
    {
        var key = text.ToString();
        counts[key] = counts.GetValueOrDefault(key) + 1;
    }
}
