using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads gauge records from CSV, wide (time, then a column a gauge) or long (gauge, time, value); which of the two is
/// found from the first row. Blank cells are missing; missing is not zero.
/// </summary>
/// <param name="File">The file, relative to the data folder.</param>
/// <param name="Unit">The unit of the depths.</param>
/// <param name="Step">The steps of time: <c>TimeStep.Days(endingAt: "09:00")</c> or <c>TimeStep.Months</c>.</param>
/// <param name="Missing">Texts that mark a missing value beside the blank cell, such as <c>-9999</c> or <c>NA</c>.</param>
/// <example><code>var rain = ReadRecords("daily.csv", RainUnit.Millimetres, TimeStep.Days(endingAt: "09:00"), missing: ["-9999"]);</code></example>
[Step("Read records")]
public sealed record ReadRecordsStep(string File, RainUnit Unit, TimeStep Step, ImmutableArray<string> Missing)
    : Step<RainRecords>
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        using var stream = context.OpenInput(File);
        using var reader = CsvText.Open(stream, File);
        var names = CsvText.Names(reader, File);
        var table = new RecordTable(File, Step, new DepthReader(File, Unit, Missing));
        RecordRows.Read(reader, names, table, stream, context);
        return table.Finish(context);
    }
}
