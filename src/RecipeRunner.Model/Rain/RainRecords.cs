using System.Collections.Immutable;
using System.Globalization;
using NodaTime;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Model.Rain;

/// <summary>The depths of rain that gauges reported, over unbroken steps of time.</summary>
public sealed class RainRecords : Artifact
{
    private readonly double[] depthsMillimetres;
    private readonly RecordStatus[] statuses;

    /// <summary>Creates the records.</summary>
    /// <param name="gaugeIds">Distinct gauge ids in ordinal order; a column each.</param>
    /// <param name="step">The steps of time.</param>
    /// <param name="labels">The labels of the steps, each the next of the one before.</param>
    /// <param name="depthsMillimetres">Depths, step after step, a value a gauge; 0 where missing.</param>
    /// <param name="statuses">What is known of each, in the same order.</param>
    /// <param name="source">The file or step it came from, as people would name it.</param>
    /// <exception cref="ArgumentException">Lengths disagree, or ids are out of order.</exception>
    public RainRecords(
        ImmutableArray<string> gaugeIds,
        TimeStep step,
        ImmutableArray<LocalDate> labels,
        double[] depthsMillimetres,
        RecordStatus[] statuses,
        string source
    )
    {
        if (depthsMillimetres.Length != gaugeIds.Length * labels.Length || statuses.Length != depthsMillimetres.Length)
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
        Step = step;
        Labels = labels;
        this.depthsMillimetres = depthsMillimetres;
        this.statuses = statuses;
        Source = source;
    }

    /// <summary>The gauges, in ordinal order; a column each.</summary>
    public ImmutableArray<string> GaugeIds { get; }

    /// <summary>The steps of time.</summary>
    public TimeStep Step { get; }

    /// <summary>The label of each step.</summary>
    public ImmutableArray<LocalDate> Labels { get; }

    /// <summary>The file or step it came from.</summary>
    public string Source { get; }

    /// <summary>The number of values that are missing.</summary>
    public int MissingCount => statuses.Count(status => status == RecordStatus.Missing);

    /// <summary>Depths of one step in millimetres, a value a gauge; 0 where missing.</summary>
    /// <param name="step">Index of the step.</param>
    public ReadOnlySpan<double> DepthsAt(int step) => depthsMillimetres.AsSpan(step * GaugeIds.Length, GaugeIds.Length);

    /// <summary>What is known of each value of one step.</summary>
    /// <param name="step">Index of the step.</param>
    public ReadOnlySpan<RecordStatus> StatusesAt(int step) => statuses.AsSpan(step * GaugeIds.Length, GaugeIds.Length);

    /// <inheritdoc/>
    public override string Describe()
    {
        var missing = statuses.Length == 0 ? 0 : 100.0 * MissingCount / statuses.Length;
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{GaugeIds.Length:N0} gauges, {Labels.Length:N0} {Step.ToSettingText()}, {missing:0.0} % missing"
        );
    }

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Step.ToSettingText());
        writer.Write(GaugeIds.Length);
        foreach (var id in GaugeIds)
        {
            writer.Write(id);
        }

        writer.Write(Labels.Length);
        foreach (var label in Labels)
        {
            writer.Write(Step.LabelText(label));
        }

        writer.Write(System.Runtime.InteropServices.MemoryMarshal.AsBytes<RecordStatus>(statuses));
        for (var i = 0; i < depthsMillimetres.Length; i++)
        {
            if (statuses[i] != RecordStatus.Missing)
            {
                writer.Write(depthsMillimetres[i]);
            }
        }
    }
}
