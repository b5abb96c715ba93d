using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Records;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads gauge records from text tables: wide (time, then a column a gauge), long (gauge, time, value) or a file a gauge,
/// plain or packed (.gz). Without a form, wide and long are found from the first rows. Blank cells are missing; missing is
/// not zero.
/// </summary>
/// <param name="File">The file, relative to the data folder; with * or ? in its name, all files that fit, read as one.</param>
/// <param name="Unit">The unit of the depths.</param>
/// <param name="Step">The steps of time: <c>TimeStep.Days(endingAt: "09:00")</c>, <c>TimeStep.Months</c>, <c>TimeStep.Minutes(15)</c>.</param>
/// <param name="Missing">Texts that mark a missing value beside the blank cell, such as <c>-9999</c> or <c>NA</c>.</param>
/// <param name="Trace">Texts that mark rain too little to measure, such as <c>T</c>.</param>
/// <param name="Accumulating">Texts that mark a step whose rain is in the gauge's next value, such as <c>A</c>.</param>
/// <param name="Estimated">Letters after a number that mark it as estimated, such as <c>E</c> in <c>12.3E</c>.</param>
/// <param name="Form">Which columns hold what.</param>
/// <example><code>var rain = ReadRecords("rain/*.csv.gz", RainUnit.Millimetres, TimeStep.Days(endingAt: "09:00"), missing: ["-9999"], form: RecordForm.Long(gauge: "station", time: "date", value: "prcp_mm"));</code></example>
[Step("Read records")]
public sealed record ReadRecordsStep(
    string File,
    RainUnit Unit,
    TimeStep Step,
    ImmutableArray<string> Missing,
    ImmutableArray<string> Trace,
    ImmutableArray<string> Accumulating,
    ImmutableArray<string> Estimated,
    RecordForm? Form
) : Step<RainRecords>, IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        RequireDepthsOfTotals();
        var (parts, forms) = (new List<RecordPart>(), new List<string>());
        foreach (var name in context.FindInputs(File))
        {
            var (part, layout) = RecordFile.Read(context, name, Settings());
            parts.Add(part);
            forms.Add(layout.Words);
        }

        context.State("form", string.Join("; ", forms.Distinct(StringComparer.Ordinal)));
        context.State("unit", Unit.Name);
        return RecordAssembly.Finish(context, parts, File);
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context)
    {
        var origins = ImmutableArray.CreateBuilder<ValueOrigin>();
        foreach (var name in context.FindInputs(File))
        {
            var (part, layout) = RecordFile.Read(context, name, Settings());
            var line = part.LineOf(records.GaugeIds[gauge], records.Times.LabelAt(step));
            if (line > 0)
            {
                origins.Add(SourceCell.At(context, name, line, layout.ColumnOf(records.GaugeIds[gauge])));
            }
        }

        return origins.ToImmutable();
    }

    private RecordSettings Settings() =>
        new(Unit, Step, new RecordMarks(Missing, Trace, Accumulating, Estimated), Form);

    /// <summary>A mean intensity says nothing of the steps before its own, so it cannot be what fell over several.</summary>
    private void RequireDepthsOfTotals()
    {
        var isTotal =
            !Accumulating.IsEmpty
            || Form is { Over: not null }
            || (Form?.Flags.Any(flag => flag.Meaning == RecordStatus.Accumulated) ?? false);
        if (Unit.IsIntensity && isTotal)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0289",
                    new Place(File),
                    $"Totals of several steps cannot be read as intensities ({Unit.Name}).",
                    "Give depths where rain accumulates over steps, or read without accumulating:, over: and Flag.Accumulating."
                )
            );
        }
    }
}
