using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>Matches the gauges of a network to the columns of records.</summary>
internal static class RecordColumns
{
    /// <summary>For each gauge of the network the column of its record; -1 where it has none.</summary>
    /// <exception cref="RefusedException">No gauge has a record.</exception>
    public static int[] Match(StepContext context, GaugeNetwork network, RainRecords records)
    {
        var match = Of(network, records);
        if (match.All(column => column < 0))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0510",
                    new Place(records.Source),
                    $"None of its gauges is in the network ({network.Source}).",
                    $"Records name {Listing.Of(records.GaugeIds)}; the network has {Listing.Of([.. network.Gauges.Select(gauge => gauge.Id)])}. Read gauges with the id: column that records use."
                )
            );
        }

        TellOfSilent(context, network, records, match);
        TellOfUnknown(context, network, records);
        return match;
    }

    /// <summary>For each gauge of the network the column of its record; -1 where it has none.</summary>
    public static int[] Of(GaugeNetwork network, RainRecords records)
    {
        var columns = records
            .GaugeIds.Select((id, column) => (id, column))
            .ToDictionary(pair => pair.id, pair => pair.column, StringComparer.Ordinal);
        return [.. network.Gauges.Select(gauge => columns.GetValueOrDefault(gauge.Id, -1))];
    }

    private static void TellOfSilent(StepContext context, GaugeNetwork network, RainRecords records, int[] match)
    {
        var silent = network.Gauges.Where((_, gauge) => match[gauge] < 0).Select(gauge => gauge.Id).ToArray();
        if (silent.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0511",
                    new Place(records.Source),
                    $"No record for {Listing.Of(silent)} of {network.Source}; they count as missing throughout.",
                    "Add their records, or leave them out with .Without(…)."
                )
            );
        }
    }

    private static void TellOfUnknown(StepContext context, GaugeNetwork network, RainRecords records)
    {
        var ids = network.Gauges.Select(gauge => gauge.Id).ToHashSet(StringComparer.Ordinal);
        var unknown = records.GaugeIds.Where(id => !ids.Contains(id)).ToArray();
        if (unknown.Length > 0)
        {
            var near = NearWords.Mend(unknown[0], ids);
            context.Find(
                Finding.Caution(
                    "RR0512",
                    new Place(records.Source),
                    $"Records of {Listing.Of(unknown)} are not used: {network.Source} has no such gauge.",
                    near
                )
            );
        }
    }
}
