using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Leaves gauges out of a network, such as one of two that stand in one place. A finding says which.</summary>
/// <param name="Gauges">The network.</param>
/// <param name="Ids">The gauges to leave out.</param>
/// <example><code>var fewer = gauges.Without("Q-22");</code></example>
[Step("Leave out", Word = "without")]
public sealed record WithoutStep(GaugeNetwork Gauges, ImmutableArray<string> Ids) : Step<GaugeNetwork>
{
    /// <inheritdoc/>
    public override GaugeNetwork Execute(StepContext context)
    {
        var known = Gauges.Gauges.Select(gauge => gauge.Id).ToHashSet(StringComparer.Ordinal);
        var problems = new Problems();
        foreach (var id in Ids.Where(id => !known.Contains(id)))
        {
            problems.Add(
                "RR0403",
                new Place(Gauges.Source, Item: $"gauge {id}"),
                "There is no such gauge to leave out.",
                NearWords.Mend(id, known)
            );
        }

        problems.ThrowIfAny();
        context.Find(
            Finding.Notice("RR0404", new Place(Gauges.Source), $"Left out by the recipe: {string.Join(", ", Ids)}.")
        );
        return new GaugeNetwork(
            Gauges.Gauges.Where(gauge => !Ids.Contains(gauge.Id, StringComparer.Ordinal)),
            Gauges.ReferenceSystem,
            Gauges.Source
        );
    }
}

/// <summary>The verb for <see cref="WithoutStep"/>.</summary>
public static class WithoutVerb
{
    /// <inheritdoc cref="WithoutStep"/>
    /// <param name="gauges">The network.</param>
    /// <param name="ids">The gauges to leave out.</param>
    public static GaugeNetwork Without(this GaugeNetwork gauges, params string[] ids) =>
        gauges.Run(new WithoutStep(gauges, [.. ids]));
}
