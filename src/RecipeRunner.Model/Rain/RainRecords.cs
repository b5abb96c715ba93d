using System.Collections.Immutable;
using System.Globalization;
using System.Runtime.InteropServices;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>The depths of rain that gauges reported over unbroken steps of time, with what is known of each value.</summary>
public sealed class RainRecords : Artifact
{
    private readonly double[] depthsMillimetres;
    private readonly RecordStatus[] statuses;

    /// <summary>Creates the records.</summary>
    /// <param name="gaugeIds">Distinct gauge ids in ordinal order; a column each.</param>
    /// <param name="times">The steps of time.</param>
    /// <param name="depthsMillimetres">
    /// Depths, step after step, a value a gauge: 0 where missing, trace or accumulated; as reported where failed. Taken without
    /// a copy; it may not change afterwards.
    /// </param>
    /// <param name="statuses">What is known of each, in the same order. Taken without a copy.</param>
    /// <param name="source">The file or step it came from, as people would name it.</param>
    /// <param name="accumulations">
    /// Depths of several steps, by gauge, then step. Steps that are <see cref="RecordStatus.Accumulated"/> without one belong to
    /// a total that is not known.
    /// </param>
    /// <exception cref="ArgumentException">Lengths disagree, ids are out of order, or an accumulation has other statuses.</exception>
    public RainRecords(
        ImmutableArray<string> gaugeIds,
        Timeline times,
        double[] depthsMillimetres,
        RecordStatus[] statuses,
        string source,
        ImmutableArray<Accumulation> accumulations = default
    )
    {
        if (depthsMillimetres.Length != gaugeIds.Length * times.Count || statuses.Length != depthsMillimetres.Length)
        {
            throw new ArgumentException(
                "Records need a value and a status for every gauge at every step.",
                nameof(depthsMillimetres)
            );
        }

        for (var i = 1; i < gaugeIds.Length; i++)
        {
            if (string.CompareOrdinal(gaugeIds[i - 1], gaugeIds[i]) >= 0)
            {
                throw new ArgumentException("Gauge ids must be distinct and in ordinal order.", nameof(gaugeIds));
            }
        }

        GaugeIds = gaugeIds;
        Times = times;
        this.depthsMillimetres = depthsMillimetres;
        this.statuses = statuses;
        Source = source;
        Accumulations = accumulations.IsDefault ? [] : accumulations;
        foreach (var total in Accumulations)
        {
            RequireAccumulated(total);
        }
    }

    /// <summary>The gauges, in ordinal order; a column each.</summary>
    public ImmutableArray<string> GaugeIds { get; }

    /// <summary>The steps of time.</summary>
    public Timeline Times { get; }

    /// <summary>The file or step it came from.</summary>
    public string Source { get; }

    /// <summary>Depths that were read once for several steps, by gauge, then step.</summary>
    public ImmutableArray<Accumulation> Accumulations { get; }

    /// <summary>The number of values that cannot be used: missing, accumulated or failed.</summary>
    public int SilentCount => statuses.Count(status => !status.Reports());

    /// <summary>Depths of one step in millimetres, a value a gauge.</summary>
    /// <param name="step">Index of the step.</param>
    public ReadOnlySpan<double> DepthsAt(int step) => depthsMillimetres.AsSpan(step * GaugeIds.Length, GaugeIds.Length);

    /// <summary>What is known of each value of one step.</summary>
    /// <param name="step">Index of the step.</param>
    public ReadOnlySpan<RecordStatus> StatusesAt(int step) => statuses.AsSpan(step * GaugeIds.Length, GaugeIds.Length);

    /// <summary>A copy of all depths, step after step, to make other records of.</summary>
    public double[] CopyDepths() => [.. depthsMillimetres];

    /// <summary>A copy of all statuses, in the same order.</summary>
    public RecordStatus[] CopyStatuses() => [.. statuses];

    /// <summary>How many values have each status, in the order of <see cref="RecordStatus"/>.</summary>
    public ImmutableArray<int> CountByStatus()
    {
        var counts = new int[(int)RecordStatus.Failed + 1];
        var bytes = MemoryMarshal.AsBytes(statuses.AsSpan());
        for (var status = 0; status < counts.Length; status++)
        {
            counts[status] = bytes.Count((byte)status);
        }

        return [.. counts];
    }

    /// <summary>How many values have each status, in words, such as <c>8,010 observed, 12 trace, 40 missing</c>.</summary>
    public string StatusWords()
    {
        var counts = CountByStatus();
        return string.Join(
            ", ",
            Enum.GetValues<RecordStatus>()
                .OrderBy(status => status == RecordStatus.Missing)
                .Where(status => counts[(int)status] > 0)
                .Select(status =>
                    string.Create(CultureInfo.InvariantCulture, $"{counts[(int)status]:N0} {status.Word()}")
                )
        );
    }

    /// <inheritdoc/>
    public override string Describe()
    {
        var silent = statuses.Length == 0 ? 0 : 100.0 * SilentCount / statuses.Length;
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(GaugeIds.Length, "gauge")}, {Times.Step.Words(Times.Count)}, {silent:0.0} % without a value"
        );
    }

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Times);
        writer.Write(GaugeIds.Length);
        foreach (var id in GaugeIds)
        {
            writer.Write(id);
        }

        for (var t = 0; t < Times.Count; t++)
        {
            writer.Write(MemoryMarshal.AsBytes(StatusesAt(t)));
            writer.Write(DepthsAt(t));
        }

        writer.Write(Accumulations.Length);
        foreach (var total in Accumulations)
        {
            writer.Write(total.Gauge);
            writer.Write(total.FirstStep);
            writer.Write(total.LastStep);
            writer.Write(total.DepthMillimetres);
        }
    }

    private void RequireAccumulated(Accumulation total)
    {
        var fits = total.FirstStep >= 0 && total.FirstStep < total.LastStep && total.LastStep < Times.Count;
        for (var t = total.FirstStep; fits && t <= total.LastStep; t++)
        {
            fits = StatusesAt(t)[total.Gauge] == RecordStatus.Accumulated;
        }

        if (!fits)
        {
            throw new ArgumentException(
                FormattableString.Invariant(
                    $"Gauge {total.Gauge} is not accumulated from step {total.FirstStep} to {total.LastStep}."
                ),
                nameof(total)
            );
        }
    }
}
