using System.Collections.Immutable;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Tracing;

/// <summary>Follows a study's numbers back: to gauges, weights, steps, recipe lines and cells of input files.</summary>
/// <param name="replay">The study, run again.</param>
/// <param name="cancellation">Stops the work.</param>
public sealed class StudyTrace(StudyReplay replay, CancellationToken cancellation)
{
    private static readonly LocalDateTimePattern Time = LocalDateTimePattern.CreateWithInvariantCulture(
        "uuuu'-'MM'-'dd'T'HH':'mm"
    );

    /// <summary>Traces the areal value of a basin at a time.</summary>
    /// <param name="basin">The basin's id.</param>
    /// <param name="time">The label of the step: <c>2024-01-14</c>, <c>2024-01</c>, <c>2024-01-14T09:00</c>.</param>
    /// <param name="step">The number of the step that gave the series; the first of the study where not given.</param>
    /// <exception cref="RefusedException">There is no such value, or the study does not rerun to it.</exception>
    public ValueTrace Of(string basin, string time, int? step)
    {
        var entry = SeriesOf(step);
        RequireSame(entry);
        var areal = (ArealRainfall)entry.Output;
        var b = BasinOf(areal, basin);
        var t = StepOf(areal, time);
        var account = ((IArealStep)entry.Step).AccountFor(areal, t, b);
        return new ValueTrace
        {
            Title = replay.Record.Title,
            Basin = basin,
            BasinName = areal.Basins.Basins[b].Name,
            AreaSquareMetres = areal.Basins.Basins[b].Shape.Area,
            Interval = areal.Times.IntervalAt(t),
            Value = areal.At(t, b),
            Account = account,
            Steps = Ancestry.Of(replay.Record, entry),
            Origins = Origins(((IArealStep)entry.Step).Rain, areal.Times.LabelAt(t), account),
            Layers = [.. replay.Record.Outputs.Select(file => file.Path).Where(IsLayer)],
        };
    }

    private static bool IsLayer(string path) =>
        path.StartsWith("layers/", StringComparison.Ordinal)
        && (path.EndsWith(".shp", StringComparison.Ordinal) || path.EndsWith(".geojson", StringComparison.Ordinal));

    private JournalEntry SeriesOf(int? number)
    {
        var series = replay
            .Record.Journal.Where(entry => entry is { Output: ArealRainfall, Step: IArealStep })
            .ToArray();
        var chosen = number is null ? series.FirstOrDefault() : series.FirstOrDefault(entry => entry.Number == number);
        return chosen
            ?? throw Refusal(
                "RR0820",
                Place.Of("series"),
                number is null
                    ? "The study computed no areal rainfall that can be accounted for."
                    : FormattableString.Invariant(
                        $"Step {number} did not compute areal rainfall that can be accounted for."
                    ),
                $"These steps did: {Listing.Of([.. series.Select(entry => FormattableString.Invariant($"{entry.Number} ({entry.Line})"))])}."
            );
    }

    /// <summary>What is traced must be what the study holds.</summary>
    private void RequireSame(JournalEntry entry)
    {
        var held = replay.Held.Steps.FirstOrDefault(step => step.Number == entry.Number);
        if (held is null || !string.Equals(held.Digest, entry.Output.Digest, StringComparison.Ordinal))
        {
            throw Refusal(
                "RR0821",
                Place.Of(FormattableString.Invariant($"step {entry.Number}")),
                "The study does not rerun to the values it holds, so its numbers cannot be traced by rerunning.",
                "See what differs with   recipe-runner rerun STUDY"
            );
        }
    }

    private static int BasinOf(ArealRainfall areal, string basin)
    {
        var ids = areal.Basins.Basins.Select(item => item.Id).ToArray();
        var index = Array.IndexOf(ids, basin);
        return index >= 0
            ? index
            : throw Refusal(
                "RR0822",
                Place.Of($"basin {basin}"),
                "The study has no such basin.",
                $"{NearWords.Mend(basin, ids)} Its basins are {Listing.Of(ids)}.".TrimStart()
            );
    }

    private static int StepOf(ArealRainfall areal, string text)
    {
        var time =
            LocalDatePattern.Iso.Parse(text).TryGetValue(default, out var date) ? date.AtMidnight()
            : LocalDatePattern.Iso.Parse(text + "-01").TryGetValue(default, out date) ? date.AtMidnight()
            : Time.Parse(text).TryGetValue(default, out var exact) ? exact
            : (LocalDateTime?)null;
        var label = time is { } known ? areal.Times.Step.LabelOf(known) : null;
        var index = label is { } named ? areal.Times.IndexOf(named) : null;
        return index
            ?? throw Refusal(
                "RR0823",
                Place.Of($"time {text}"),
                $"The series has no step of this name; it has {areal.Times.Step.ToSettingText()} from {areal.Times}.",
                $"Name a step as the table does, such as {areal.Times.TextAt(0)}."
            );
    }

    private ImmutableArray<DepthOrigin> Origins(RainRecords rain, LocalDateTime label, ArealAccount account)
    {
        var step = rain.Times.IndexOf(label)!.Value;
        var context = new InputContext(replay.InputFolder!, cancellation);
        return
        [
            .. account.Shares.Select(share =>
                new DepthPath(replay.Record, context).Of(rain, rain.GaugeIds.IndexOf(share.Gauge), step)
            ),
        ];
    }

    private static RefusedException Refusal(string code, Place place, string what, string mend) =>
        new(Finding.Error(code, place, what, mend));
}
