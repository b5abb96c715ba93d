using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>Leaves the records of some gauges out. A finding says which.</summary>
/// <param name="Rain">Gauge records.</param>
/// <param name="Ids">The gauges to leave out.</param>
/// <example><code>var others = rain.Without("Q-19");</code></example>
[Step("Leave out records", Word = "without")]
public sealed record WithoutRecordsStep(RainRecords Rain, ImmutableArray<string> Ids) : Step<RainRecords>, IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        var problems = new Problems();
        foreach (var id in Ids.Where(id => !Rain.GaugeIds.Contains(id, StringComparer.Ordinal)))
        {
            problems.Add(
                "RR0528",
                new Place(Rain.Source, Item: $"gauge {id}"),
                "There are no records of this gauge to leave out.",
                NearWords.Mend(id, Rain.GaugeIds)
            );
        }

        var kept = Enumerable
            .Range(0, Rain.GaugeIds.Length)
            .Where(gauge => !Ids.Contains(Rain.GaugeIds[gauge], StringComparer.Ordinal))
            .ToArray();
        if (problems.Count == 0 && kept.Length == 0)
        {
            problems.Add("RR0529", new Place(Rain.Source), "No records would be left.", "Leave fewer gauges out.");
        }

        problems.ThrowIfAny();
        context.Find(
            Finding.Notice("RR0537", new Place(Rain.Source), $"Left out by the recipe: {string.Join(", ", Ids)}.")
        );
        return Only(kept);
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context) =>
        [new EarlierValue(Rain, Rain.GaugeIds.IndexOf(records.GaugeIds[gauge]), step)];

    private RainRecords Only(int[] kept)
    {
        var (depths, statuses) = (
            new double[Rain.Times.Count * kept.Length],
            new RecordStatus[Rain.Times.Count * kept.Length]
        );
        for (var t = 0; t < Rain.Times.Count; t++)
        {
            for (var i = 0; i < kept.Length; i++)
            {
                depths[(t * kept.Length) + i] = Rain.DepthsAt(t)[kept[i]];
                statuses[(t * kept.Length) + i] = Rain.StatusesAt(t)[kept[i]];
            }
        }

        return new RainRecords(
            [.. kept.Select(gauge => Rain.GaugeIds[gauge])],
            Rain.Times,
            depths,
            statuses,
            Rain.Source,
            [
                .. Rain
                    .Accumulations.Where(total => kept.Contains(total.Gauge))
                    .Select(total => total with { Gauge = Array.IndexOf(kept, total.Gauge) }),
            ]
        );
    }
}

/// <summary>The verb for <see cref="WithoutRecordsStep"/>.</summary>
public static class WithoutRecordsVerb
{
    /// <inheritdoc cref="WithoutRecordsStep"/>
    /// <param name="rain">Gauge records.</param>
    /// <param name="ids">The gauges to leave out.</param>
    public static RainRecords Without(this RainRecords rain, params string[] ids) =>
        rain.Run(new WithoutRecordsStep(rain, [.. ids]));
}
