using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Joins what several files hold: other gauges, other spans, or both. Where two give the same value it is taken once; where they differ, both are named.</summary>
internal sealed class RecordMerge
{
    private readonly IReadOnlyList<RecordPart> parts;
    private readonly Timeline times;
    private readonly string[] gaugeIds;
    private readonly Dictionary<string, int> gaugeAt;
    private readonly double[] depths;
    private readonly RecordStatus[] statuses;
    private readonly int[] owners;
    private readonly int[] stepLines;
    private readonly Problems problems = new();
    private int agreeing;

    private RecordMerge(IReadOnlyList<RecordPart> parts, string source)
    {
        this.parts = parts;
        times = SpanOf(parts);
        gaugeIds =
        [
            .. parts.SelectMany(part => part.GaugeIds).Distinct(StringComparer.Ordinal).Order(StringComparer.Ordinal),
        ];
        gaugeAt = gaugeIds
            .Select((id, at) => (id, at))
            .ToDictionary(pair => pair.id, pair => pair.at, StringComparer.Ordinal);
        RecordSpan.RequireRoom(source, times, gaugeIds.Length);
        depths = new double[times.Count * gaugeIds.Length];
        statuses = new RecordStatus[depths.Length];
        owners = new int[depths.Length];
        stepLines = new int[times.Count];
    }

    /// <summary>Joins parts of the same steps.</summary>
    /// <param name="context">Takes what is worth knowing.</param>
    /// <param name="parts">At least one.</param>
    /// <param name="source">The pattern that names the files.</param>
    /// <exception cref="RefusedException">Two files give different values.</exception>
    public static RecordPart Of(StepContext context, IReadOnlyList<RecordPart> parts, string source)
    {
        var merge = new RecordMerge(parts, source);
        for (var p = 0; p < parts.Count; p++)
        {
            merge.Add(p);
        }

        var totals = merge.Totals();
        merge.problems.ThrowIfAny();
        merge.TellOfAgreeing(context, source);
        return new RecordPart(
            source,
            merge.gaugeIds,
            merge.times,
            merge.depths,
            merge.statuses,
            totals,
            new SourceLines(merge.stepLines, merge.gaugeIds.Length, IsWide: true)
        );
    }

    private static Timeline SpanOf(IReadOnlyList<RecordPart> parts)
    {
        var step = parts[0].Times.Step;
        var (first, last) = (parts.Min(part => part.Times.First), parts.Max(part => part.Times.Last));
        return new Timeline(step, first, step.StepsBetween(first, last) + 1);
    }

    private void Add(int p)
    {
        var part = parts[p];
        var columns = Array.ConvertAll(part.GaugeIds, id => gaugeAt[id]);
        var shift = times.Step.StepsBetween(times.First, part.Times.First);
        for (var step = 0; step < part.Times.Count; step++)
        {
            stepLines[step + shift] |= part.Lines.HasRow(step) ? 1 : 0;
            for (var gauge = 0; gauge < columns.Length; gauge++)
            {
                var from = (step * columns.Length) + gauge;
                if (part.Statuses[from] != RecordStatus.Missing)
                {
                    Lay(
                        p,
                        (step, gauge),
                        part.Depths[from],
                        part.Statuses[from],
                        ((step + shift) * gaugeIds.Length) + columns[gauge]
                    );
                }
            }
        }
    }

    private void Lay(int p, (int Step, int Gauge) from, double depth, RecordStatus status, int at)
    {
        if (statuses[at] == RecordStatus.Missing)
        {
            (depths[at], statuses[at], owners[at]) = (depth, status, p);
        }
        else if (statuses[at] == status && depths[at] == depth)
        {
            agreeing++;
        }
        else
        {
            var other = parts[owners[at]];
            var step = times.Step.StepsBetween(other.Times.First, parts[p].Times.LabelAt(from.Step));
            var gauge = Array.BinarySearch(other.GaugeIds, parts[p].GaugeIds[from.Gauge], StringComparer.Ordinal);
            AddConflict(
                p,
                (parts[p].GaugeIds[from.Gauge], parts[p].Times.TextAt(from.Step)),
                Words(depth, status),
                parts[p].Lines.LineOf(from.Step, from.Gauge),
                $"{other.File} line {other.Lines.LineOf(step, gauge).ToString(CultureInfo.InvariantCulture)} says {Words(depths[at], statuses[at])}"
            );
        }
    }

    private void AddConflict(int p, (string Gauge, string Step) what, string words, int line, string other) =>
        problems.Add(
            "RR0267",
            new Place(parts[p].File, line, Item: $"gauge {what.Gauge}"),
            $"For {what.Step} it says {words}; {other}.",
            "Take one of the two out, or correct it."
        );

    private static string Words(double depth, RecordStatus status) =>
        string.Create(CultureInfo.InvariantCulture, $"{depth:0.####} mm, {status.Word()}");

    private List<SpanTotal> Totals()
    {
        var kept = new SortedDictionary<(int Gauge, int LastStep), (SpanTotal Total, int Part)>();
        for (var p = 0; p < parts.Count; p++)
        {
            var shift = times.Step.StepsBetween(times.First, parts[p].Times.First);
            foreach (var own in parts[p].Totals)
            {
                var total = own with { Gauge = gaugeAt[parts[p].GaugeIds[own.Gauge]], LastStep = own.LastStep + shift };
                if (kept.TryAdd((total.Gauge, total.LastStep), (total, p)))
                {
                    continue;
                }

                var (other, at) = kept[(total.Gauge, total.LastStep)];
                if (total with { Line = other.Line } == other)
                {
                    agreeing++;
                    continue;
                }

                AddConflict(
                    p,
                    (gaugeIds[total.Gauge], times.TextAt(total.LastStep)),
                    TotalWords(total),
                    total.Line,
                    $"{parts[at].File} line {other.Line.ToString(CultureInfo.InvariantCulture)} says {TotalWords(other)}"
                );
            }
        }

        return [.. kept.Values.Select(pair => pair.Total)];
    }

    private static string TotalWords(SpanTotal total) =>
        string.Create(CultureInfo.InvariantCulture, $"{total.Depth:0.####} mm over {total.Steps} steps");

    private void TellOfAgreeing(StepContext context, string source)
    {
        if (agreeing > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0268",
                    new Place(source),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{Counted.Of(agreeing, "value stands", "values stand")} in more than one file, with the same depth."
                    )
                )
            );
        }
    }
}
