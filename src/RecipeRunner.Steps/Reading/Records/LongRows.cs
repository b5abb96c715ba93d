using System.Runtime.InteropServices;
using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>The values of a long file, kept as they come and laid out once gauges and span are known.</summary>
internal sealed class LongRows(string file, TimeStep step)
{
    private readonly Dictionary<string, int> gauges = new(StringComparer.Ordinal);
    private readonly List<string> names = [];
    private readonly List<Entry> entries = [];
    private readonly List<SpanTotal> totals = [];
    private readonly RecordSpan span = new(file, step);
    private (string Id, int Gauge) latest = ("", -1);

    /// <summary>True where nothing was taken in.</summary>
    public bool IsEmpty => !span.HasRows;

    /// <summary>The index of a gauge, new or known.</summary>
    public int GaugeOf(ReadOnlySpan<char> id)
    {
        if (latest.Gauge >= 0 && id.SequenceEqual(latest.Id))
        {
            return latest.Gauge;
        }

        var known = gauges.GetAlternateLookup<ReadOnlySpan<char>>();
        if (!known.TryGetValue(id, out var name, out var gauge))
        {
            (name, gauge) = (id.ToString(), gauges.Count);
            gauges.Add(name, gauge);
            names.Add(name);
        }

        latest = (name, gauge);
        return gauge;
    }

    /// <summary>The id of a gauge.</summary>
    public string IdOf(int gauge) => names[gauge];

    /// <summary>Adds a value of one step.</summary>
    public void Add(int gauge, LocalDateTime label, Cell cell, (int Line, int Column) place, Problems problems)
    {
        if (span.Offset(label, place.Line, gauges.Count, problems) is { } offset)
        {
            entries.Add(new Entry(gauge, offset, place.Line, place.Column, cell));
        }
    }

    /// <summary>Adds a total of several steps that ends at a label.</summary>
    /// <param name="gauge">Index of the gauge.</param>
    /// <param name="label">The last of its steps.</param>
    /// <param name="steps">How many; 1 where that is not known.</param>
    /// <param name="depth">Millimetres; null where it cannot be used.</param>
    /// <param name="place">Line and column.</param>
    /// <param name="problems">Takes what is wrong.</param>
    public void AddTotal(
        int gauge,
        LocalDateTime label,
        int steps,
        double? depth,
        (int Line, int Column) place,
        Problems problems
    )
    {
        if (span.Offset(label, place.Line, gauges.Count, problems) is { } offset)
        {
            totals.Add(new SpanTotal(gauge, offset, steps, depth, place.Line));
        }
    }

    /// <summary>What the file holds.</summary>
    /// <param name="problems">Takes values that stand twice.</param>
    /// <exception cref="RefusedException">There was no row.</exception>
    public RecordPart Finish(Problems problems)
    {
        problems.ThrowIfAny();
        span.RequireRows();
        var ids = gauges.Keys.Order(StringComparer.Ordinal).ToArray();
        var places = new int[ids.Length];
        for (var i = 0; i < ids.Length; i++)
        {
            places[gauges[ids[i]]] = i;
        }

        var depths = new double[(long)span.Count * ids.Length];
        var statuses = new RecordStatus[depths.Length];
        var lines = new int[depths.Length];
        foreach (ref readonly var entry in CollectionsMarshal.AsSpan(entries))
        {
            var at = ((entry.Offset - span.Lowest) * ids.Length) + places[entry.Gauge];
            if (lines[at] > 0)
            {
                AddDuplicate(entry, ids[places[entry.Gauge]], lines[at], problems);
                continue;
            }

            (lines[at], depths[at], statuses[at]) = (entry.Line, entry.Cell.Depth, entry.Cell.Status);
        }

        problems.ThrowIfAny();
        var moved = totals.ConvertAll(total =>
            total with
            {
                Gauge = places[total.Gauge],
                LastStep = total.LastStep - span.Lowest,
            }
        );
        foreach (var total in moved)
        {
            var at = (total.LastStep * ids.Length) + total.Gauge;
            lines[at] = lines[at] > 0 ? lines[at] : total.Line;
        }

        return new RecordPart(
            file,
            ids,
            span.Times,
            depths,
            statuses,
            moved,
            new SourceLines(lines, ids.Length, IsWide: false)
        );
    }

    private void AddDuplicate(in Entry entry, string gauge, int line, Problems problems)
    {
        var label = step.After(span.Times.First, entry.Offset - span.Lowest);
        problems.Add(
            "RR0255",
            new Place(file, entry.Line, entry.Column, $"gauge {gauge}"),
            FormattableString.Invariant($"It has a value for {step.LabelText(label)} at line {line} already."),
            SummerTime.DuplicateMend(step, label)
        );
    }

    private readonly record struct Entry(int Gauge, int Offset, int Line, int Column, Cell Cell);
}
