using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Reading.Ghcn;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads gauges from the station list of GHCN-Daily, <c>ghcnd-stations.txt</c>, in degrees (EPSG:4326) with elevations. The list
/// has over 120,000 stations: say which are wanted, by records or by ids.
/// </summary>
/// <param name="File">The file, relative to the data folder.</param>
/// <param name="Of">Records whose gauges are wanted.</param>
/// <param name="Ids">The ids that are wanted; all of the file's, or of the records, where none is given.</param>
/// <example><code>var gauges = ReadGhcnStations("ghcnd-stations.txt", of: rain).To(grid);</code></example>
[Step("Read GHCN stations", Word = "read", Source = "NOAA GHCN-Daily readme.txt, section IV")]
public sealed record ReadGhcnStationsStep(string File, RainRecords? Of, ImmutableArray<string> Ids) : Step<GaugeNetwork>
{
    /// <inheritdoc/>
    public override GaugeNetwork Execute(StepContext context)
    {
        string[] asked = [.. Of?.GaugeIds ?? [], .. Ids];
        var wanted = asked.Length == 0 ? null : asked.ToHashSet(StringComparer.Ordinal);
        var gauges = StationList.Read(context, File, wanted);
        if (gauges.Count == 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0243",
                    new Place(File),
                    wanted is null
                        ? "It holds no gauges."
                        : $"It holds none of the {wanted.Count.ToString(System.Globalization.CultureInfo.InvariantCulture)} gauges asked for, such as {asked[0]}.",
                    "Gauges are named by the ids of GHCN-Daily, eleven characters such as USC00026481."
                )
            );
        }

        TellOfAbsent(context, asked, gauges);
        return new GaugeNetwork(gauges, ReferenceSystems.Find("EPSG:4326"), File);
    }

    private void TellOfAbsent(StepContext context, string[] asked, List<Gauge> gauges)
    {
        var found = gauges.Select(gauge => gauge.Id).ToHashSet(StringComparer.Ordinal);
        var absent = asked.Where(id => !found.Contains(id)).Distinct(StringComparer.Ordinal).ToArray();
        if (absent.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0283",
                    new Place(File),
                    $"It does not list {Listing.Of(absent)}.",
                    "Is the list older than the records?"
                )
            );
        }
    }
}
