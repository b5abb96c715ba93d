using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tracing;

/// <summary>Follows one value of records back through the steps that it passed, to the cells of input files.</summary>
internal sealed class DepthPath(StudyRecord record, StepContext context)
{
    private readonly SortedSet<int> steps = [];
    private readonly List<FileValue> cells = [];

    /// <summary>The path of a value.</summary>
    public DepthOrigin Of(RainRecords rain, int gauge, int step)
    {
        Follow(rain, gauge, step);
        return new DepthOrigin(
            rain.GaugeIds[gauge],
            [.. steps.Reverse().Select(number => record.Journal[number - 1])],
            [.. cells]
        );
    }

    private void Follow(RainRecords rain, int gauge, int step)
    {
        var entry = record.Journal[rain.Lineage!.Entry - 1];
        steps.Add(entry.Number);
        if (entry.Step is not IRecordStep source)
        {
            return;
        }

        foreach (var origin in source.OriginsOf(rain, gauge, step, context))
        {
            if (origin is EarlierValue earlier)
            {
                Follow(earlier.Records, earlier.Gauge, earlier.Step);
            }
            else if (origin is FileValue cell)
            {
                cells.Add(cell);
            }
        }
    }
}
