using System.Globalization;
using System.Text;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Summarising;

/// <summary>Draws basins, cells and gauges. Gauges are told apart by shape as well as colour.</summary>
internal static class MapDrawing
{
    private const double SheetWidth = 760;
    private const int MostLabels = 150;

    /// <summary>The map of one weighing.</summary>
    /// <param name="weights">The weights, which hold basins, cells and gauges.</param>
    /// <param name="record">The study, to know which gauges have records.</param>
    public static string Of(WeightTable weights, StudyRecord record)
    {
        var used = weights.Weights.Select(weight => weight.Gauge).ToHashSet();
        var gauges = weights.Cells.Gauges.Gauges;
        var shown = Bounds.Of(used.Select(gauge => gauges[gauge].Place)).With(weights.Basins.Bounds);
        var view = new MapView(shown, SheetWidth);
        var svg = new StringBuilder();
        var (width, height) = (MapView.Text(view.Width), MapView.Text(view.Height));
        svg.Append(
            CultureInfo.InvariantCulture,
            $"<svg class=\"map\" viewBox=\"0 0 {width} {height}\" role=\"img\" aria-labelledby=\"map-title\">"
        );
        svg.Append("<title id=\"map-title\">Map of basins, Thiessen cells and gauges</title>");
        svg.Append(
            CultureInfo.InvariantCulture,
            $"<clipPath id=\"sheet\"><rect width=\"{width}\" height=\"{height}\"/></clipPath><g clip-path=\"url(#sheet)\">"
        );
        foreach (var basin in weights.Basins.Basins)
        {
            svg.Append(
                CultureInfo.InvariantCulture,
                $"<path class=\"basin\" fill-rule=\"evenodd\" d=\"{view.Path(basin.Shape)}\"><title>{Html.Escape(basin.Name)}</title></path>"
            );
        }

        foreach (var outline in weights.Cells.Outlines)
        {
            svg.Append(CultureInfo.InvariantCulture, $"<path class=\"cell\" d=\"{view.Path(outline)}\"/>");
        }

        foreach (var basin in weights.Basins.Basins.Where(_ => weights.Basins.Basins.Length <= MostLabels))
        {
            svg.Append(Label(view.On(Middle(basin.Shape)), Html.Escape(basin.Id), "basin-label"));
        }

        var silent = SilentGauges(weights.Cells.Gauges, record);
        for (var gauge = 0; gauge < gauges.Length; gauge++)
        {
            if (view.Shows(gauges[gauge].Place))
            {
                svg.Append(
                    GaugeMark(
                        view,
                        gauges[gauge],
                        used.Contains(gauge),
                        silent.Contains(gauges[gauge].Id),
                        gauges.Length <= MostLabels
                    )
                );
            }
        }

        return svg.Append("</g>").Append(ScaleBar(view)).Append("</svg>").ToString();
    }

    private static string GaugeMark(MapView view, Gauge gauge, bool used, bool silent, bool labelled)
    {
        var (x, y) = view.On(gauge.Place);
        var (cx, cy) = (MapView.Text(x), MapView.Text(y));
        var mark =
            silent ? $"<path class=\"silent\" d=\"M{MapView.Text(x - 5)} {MapView.Text(y - 5)}l10 10m0 -10l-10 10\"/>"
            : used ? $"<circle class=\"used\" cx=\"{cx}\" cy=\"{cy}\" r=\"4.5\"/>"
            : $"<rect class=\"unused\" x=\"{MapView.Text(x - 4)}\" y=\"{MapView.Text(y - 4)}\" width=\"8\" height=\"8\"/>";
        return labelled ? mark + Label((x + 7, y - 5), Html.Escape(gauge.Id), "gauge-label") : mark;
    }

    private static string Label((double X, double Y) at, string escaped, string style) =>
        $"<text class=\"{style}\" x=\"{MapView.Text(at.X)}\" y=\"{MapView.Text(at.Y)}\">{escaped}</text>";

    private static string ScaleBar(MapView view)
    {
        var kilometres = RoundLength(view.Width * view.MetresPerUnit / 5000);
        var length = kilometres * 1000 / view.MetresPerUnit;
        var y = MapView.Text(view.Height - 14);
        return $"<path class=\"bar\" d=\"M14 {y}h{MapView.Text(length)}m0 -4v8m-{MapView.Text(length)} -8v8\"/>"
            + Label((14, view.Height - 22), $"{Html.Number(kilometres, "0.####")} km · grid north up", "gauge-label");
    }

    private static double RoundLength(double kilometres)
    {
        var power = Math.Pow(10, Math.Floor(Math.Log10(kilometres)));
        return (kilometres / power) switch
        {
            < 2 => power,
            < 5 => 2 * power,
            _ => 5 * power,
        };
    }

    /// <summary>The middle of the widest west-east chord through the middle of the largest part: inside the shape.</summary>
    private static Location Middle(Region region)
    {
        var part = region.Parts.MaxBy(candidate => candidate.Shell.SignedArea)!;
        var box = Bounds.Of(part.Shell.Vertices);
        var y = box.South + (box.Height * 0.4987);
        var crossings = part.Rings.SelectMany(ring => Crossings(ring, y)).Order().ToArray();
        var widest = Enumerable.Range(0, crossings.Length / 2).MaxBy(i => crossings[(2 * i) + 1] - crossings[2 * i]);
        return crossings.Length < 2
            ? part.Shell.Vertices[0]
            : new Location((crossings[2 * widest] + crossings[(2 * widest) + 1]) / 2, y);
    }

    private static IEnumerable<double> Crossings(Ring ring, double y)
    {
        for (var i = 0; i < ring.Vertices.Length; i++)
        {
            var (a, b) = (ring.Vertices[i], ring.Vertices[(i + 1) % ring.Vertices.Length]);
            if (a.Y > y != b.Y > y)
            {
                yield return a.X + ((y - a.Y) / (b.Y - a.Y) * (b.X - a.X));
            }
        }
    }

    private static HashSet<string> SilentGauges(GaugeNetwork network, StudyRecord record)
    {
        var reporting = record.Results<RainRecords>().SelectMany(ReportingGauges).ToHashSet(StringComparer.Ordinal);
        return record.Results<RainRecords>().Any()
            ? [.. network.Gauges.Select(gauge => gauge.Id).Where(id => !reporting.Contains(id))]
            : [];
    }

    private static IEnumerable<string> ReportingGauges(RainRecords records)
    {
        var reports = new bool[records.GaugeIds.Length];
        for (var t = 0; t < records.Times.Count; t++)
        {
            var statuses = records.StatusesAt(t);
            for (var gauge = 0; gauge < reports.Length; gauge++)
            {
                reports[gauge] |= statuses[gauge].Reports();
            }
        }

        return records.GaugeIds.Where((_, gauge) => reports[gauge]);
    }
}
