using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Comparing;

/// <summary>Says what changed from one study to another, and why areal values did. Of each study the first series of areal rainfall is taken.</summary>
public static class TwoStudies
{
    /// <summary>Compares two studies, each run again from itself.</summary>
    /// <param name="was">The first.</param>
    /// <param name="now">The second.</param>
    public static StudyDifference Compare(StudyReplay was, StudyReplay now)
    {
        var difference = new StudyDifference
        {
            Tools = Changes([("tool", was.Held.Tool)], [("tool", now.Held.Tool)]),
            Inputs = Changes(
                was.Record.Inputs.Select(file => (file.Path, file.Sha256)),
                now.Record.Inputs.Select(file => (file.Path, file.Sha256))
            ),
            Settings = Changes(
                was.Record.Settings.Select(setting => (setting.Name, setting.Value)),
                now.Record.Settings.Select(setting => (setting.Name, setting.Value))
            ),
            RecipeLines = RecipeLines.Changed(Recipe(was), Recipe(now)),
        };
        return (SeriesOf(was.Record), SeriesOf(now.Record)) is ({ } first, { } second)
            ? WithRain(difference, first, second)
            : difference with
            {
                NotCompared = "One of the studies computed no areal rainfall that can be accounted for.",
            };
    }

    /// <summary>What differs between two lists of named things, in the order of the first, then of the second.</summary>
    internal static ImmutableArray<Change> Changes(
        IEnumerable<(string Name, string Text)> was,
        IEnumerable<(string Name, string Text)> now
    )
    {
        var (first, second) = (was.ToArray(), now.ToArray());
        var before = first.ToDictionary(item => item.Name, item => item.Text, StringComparer.Ordinal);
        var after = second.ToDictionary(item => item.Name, item => item.Text, StringComparer.Ordinal);
        return
        [
            .. first
                .Concat(second)
                .Select(item => item.Name)
                .Distinct(StringComparer.Ordinal)
                .Select(name => new Change(name, before.GetValueOrDefault(name, ""), after.GetValueOrDefault(name, "")))
                .Where(change => !string.Equals(change.Was, change.Is, StringComparison.Ordinal)),
        ];
    }

    private static StudyDifference WithRain(StudyDifference difference, JournalEntry first, JournalEntry second)
    {
        var (was, now) = ((IArealStep)first.Step, (IArealStep)second.Step);
        difference = difference with
        {
            Gauges = Changes(Places(was), Places(now)),
            Basins = Changes(Outlines(was), Outlines(now)),
            Weights = Changes(Shares(was.Weights), Shares(now.Weights)),
        };
        return was.Rain.Times.Step == now.Rain.Times.Step
            ? RainAttribution.Add(difference, (was, (ArealRainfall)first.Output), (now, (ArealRainfall)second.Output))
            : difference with
            {
                NotCompared =
                    $"The series have different steps: {was.Rain.Times.Step.ToSettingText()}, and {now.Rain.Times.Step.ToSettingText()}.",
            };
    }

    private static JournalEntry? SeriesOf(StudyRecord record) =>
        record.Journal.FirstOrDefault(entry => entry is { Output: ArealRainfall, Step: IArealStep });

    private static string[] Recipe(StudyReplay replay) =>
        File.ReadAllLines(Path.Combine(replay.Held.Payload, "recipe", replay.Held.RecipeName));

    private static IEnumerable<(string, string)> Places(IArealStep step) =>
        step.Weights.Cells.Gauges.Gauges.Select(gauge =>
            (gauge.Id, Text($"{gauge.Place.X:0.###} E {gauge.Place.Y:0.###} N"))
        );

    private static IEnumerable<(string, string)> Outlines(IArealStep step) =>
        step.Weights.Basins.Basins.Select(basin =>
            (
                basin.Id,
                Text(
                    $"{basin.Shape.Area / 1e6:0.######} km², {basin.Shape.Rings.Sum(ring => ring.Vertices.Length)} points, {basin.Shape.Bounds.West:0.###} to {basin.Shape.Bounds.East:0.###} E, {basin.Shape.Bounds.South:0.###} to {basin.Shape.Bounds.North:0.###} N"
                )
            )
        );

    private static IEnumerable<(string, string)> Shares(WeightTable table) =>
        table.Weights.Select(weight =>
            (
                $"{table.Basins.Basins[weight.Basin].Id} {table.Cells.Gauges.Gauges[weight.Gauge].Id}",
                Text($"{weight.Share:0.############}")
            )
        );

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
