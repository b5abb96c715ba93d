using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Makes records of what files hold: joins them, settles which depths belong to several steps, and says what is doubtful.</summary>
internal static class RecordAssembly
{
    /// <summary>Makes the records.</summary>
    /// <param name="context">Takes findings and statements.</param>
    /// <param name="parts">What each file holds, in order of their names.</param>
    /// <param name="source">The file, or the pattern that names them.</param>
    /// <exception cref="RefusedException">Files contradict each other.</exception>
    public static RainRecords Finish(StepContext context, IReadOnlyList<RecordPart> parts, string source)
    {
        var part = parts.Count == 1 ? parts[0] : RecordMerge.Of(context, parts, source);
        RowFindings.Tell(context, part);
        var accumulations = AccumulationFinder.Settle(context, part);
        var records = new RainRecords(
            [.. part.GaugeIds],
            part.Times,
            part.Depths,
            part.Statuses,
            source,
            accumulations
        );
        RecordFindings.Tell(context, records);
        context.State("values", records.StatusWords());
        return records;
    }
}
