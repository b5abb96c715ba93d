using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Reading.Ghcn;
using RecipeRunner.Steps.Reading.Records;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads rain from files of the Global Historical Climatology Network, GHCN-Daily, as NOAA gives them out: <c>.dly</c>, or
/// by-year and by-station <c>.csv</c>, plain or packed. Values with a quality flag are failed, traces are traces, totals of
/// several days are accumulations.
/// </summary>
/// <param name="File">The file, relative to the data folder; with * or ? in its name, all files that fit, read as one.</param>
/// <param name="Step">The observation days; the files give dates alone, and times of observation only for some gauges.</param>
/// <param name="Gauges">The network whose gauges are wanted; all of the file's where not given.</param>
/// <example><code>var rain = ReadGhcnDaily("2023.csv.gz", TimeStep.Days(endingAt: "07:00"), gauges);</code></example>
[Step(
    "Read GHCN-Daily",
    Source = "Menne et al. 2012, doi:10.1175/JTECH-D-11-00103.1; NOAA GHCN-Daily readme.txt, section III"
)]
public sealed record ReadGhcnDailyStep(string File, TimeStep Step, GaugeNetwork? Gauges)
    : Step<RainRecords>,
        IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        RequireDays();
        var wanted = Gauges?.Gauges.Select(gauge => gauge.Id).ToHashSet(StringComparer.Ordinal);
        var (parts, forms) = (new List<RecordPart>(), new SortedSet<string>(StringComparer.Ordinal));
        var (times, presumedZero, contradicting) = (new ObservationTimes(), 0, 0);
        foreach (var name in context.FindInputs(File))
        {
            var (rows, form) = GhcnFile.Read(context, name, Step, wanted, times);
            forms.Add(form);
            presumedZero += rows.PresumedZero;
            contradicting += rows.Contradicting;
            if (!rows.IsEmpty)
            {
                parts.Add(rows.Finish());
            }
        }

        RequireSome(parts);
        context.State("form", string.Join("; ", forms));
        context.State("unit", RainUnit.TenthsOfMillimetre.Name);
        times.Tell(context, File, Step);
        TellOfCount(
            context,
            "RR0281",
            presumedZero,
            (
                "was missing and is presumed zero by the source (flag P); it counts as an estimated zero",
                "were missing and are presumed zero by the source (flag P); they count as estimated zeros"
            )
        );
        TellOfCount(
            context,
            "RR0288",
            contradicting,
            (
                "has a flag that says that there was nothing to measure (T or P), and yet a depth; it counts as failed",
                "have a flag that says that there was nothing to measure (T or P), and yet a depth; they count as failed"
            )
        );
        return RecordAssembly.Finish(context, parts, File);
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context)
    {
        var wanted = new HashSet<string>(StringComparer.Ordinal) { records.GaugeIds[gauge] };
        var label = records.Times.LabelAt(step);
        var origins = ImmutableArray.CreateBuilder<ValueOrigin>();
        foreach (var name in context.FindInputs(File))
        {
            var (rows, _) = GhcnFile.Read(context, name, Step, wanted, new ObservationTimes());
            var line = rows.IsEmpty ? 0 : rows.Finish().LineOf(records.GaugeIds[gauge], label);
            if (line > 0)
            {
                origins.Add(GhcnFile.ValueAt(context, name, line, label.Day));
            }
        }

        return origins.ToImmutable();
    }

    private void RequireDays()
    {
        if (Step.IntervalOf(Step.LabelOf(new NodaTime.LocalDateTime(2024, 1, 31, 0, 0))!.Value).Hours != 24)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0286",
                    new Place(File),
                    $"GHCN-Daily holds days, not {Step.ToSettingText()}.",
                    "Say when its days end, such as   step: TimeStep.Days(endingAt: \"07:00\")"
                )
            );
        }
    }

    private void RequireSome(List<RecordPart> parts)
    {
        if (parts.Count == 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0287",
                    new Place(File),
                    Gauges is null
                        ? "It holds no rain (elements PRCP, MDPR)."
                        : $"It holds no rain of the {Gauges.Gauges.Length.ToString(CultureInfo.InvariantCulture)} gauges of {Gauges.Source}, such as {Listing.Of([.. Gauges.Gauges.Select(gauge => gauge.Id).Take(3)])}.",
                    "Gauges are named by the ids of GHCN-Daily, eleven characters such as USC00026481."
                )
            );
        }
    }

    private void TellOfCount(StepContext context, string code, int count, (string One, string Many) words)
    {
        if (count > 0)
        {
            context.Find(
                Finding.Caution(
                    code,
                    new Place(File),
                    $"{Counted.Of(count, $"value {words.One}", $"values {words.Many}")}.",
                    "Where such days matter, compare them with gauges nearby."
                )
            );
        }
    }
}
