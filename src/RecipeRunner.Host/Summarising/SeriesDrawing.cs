using System.Globalization;
using System.Text;
using RecipeRunner.Model.Rain;

namespace RecipeRunner.Host.Summarising;

/// <summary>Draws the rain of one basin through time as bars, and under them the share of its weight that reported.</summary>
internal static class SeriesDrawing
{
    private const int MostBars = 366;
    private const double Width = 760;
    private const double BarsTop = 14;
    private const double BarsHeight = 70;
    private const double StripTop = 90;
    private const double StripHeight = 10;

    /// <summary>The drawing of one basin.</summary>
    public static string Of(ArealRainfall areal, int basin)
    {
        var together = (areal.Times.Count + MostBars - 1) / MostBars;
        var bars = Enumerable
            .Range(0, (areal.Times.Count + together - 1) / together)
            .Select(i => Bar.Of(areal, basin, i * together, together))
            .ToArray();
        var most = Math.Max(0.1, bars.Max(bar => bar.Depth));
        var step = Width / bars.Length;
        var name = Html.Escape(areal.Basins.Basins[basin].Name);
        var svg = new StringBuilder();
        svg.Append(
            CultureInfo.InvariantCulture,
            $"<svg class=\"series\" viewBox=\"0 0 {Width} 118\" role=\"img\" aria-label=\"Rain through time, {name}\">"
        );
        for (var i = 0; i < bars.Length; i++)
        {
            svg.Append(Drawn(bars[i], i * step, step, most));
        }

        svg.Append(CultureInfo.InvariantCulture, $"<path class=\"axis\" d=\"M0 {BarsTop + BarsHeight}H{Width}\"/>");
        var sums = together == 1 ? "" : string.Create(CultureInfo.InvariantCulture, $", sums of {together} steps");
        svg.Append(Label(0, 10, $"up to {Html.Number(most, "0.0")} mm{sums}", "start"));
        svg.Append(Label(0, 114, areal.Times.TextAt(0), "start"));
        svg.Append(Label(Width, 114, areal.Times.TextAt(areal.Times.Count - 1), "end"));
        return svg.Append("</svg>").ToString();
    }

    private static string Drawn(Bar bar, double x, double step, double most)
    {
        var height = BarsHeight * bar.Depth / most;
        var (left, wide) = (MapView.Text(x), MapView.Text(Math.Max(0.5, step * 0.85)));
        var rain =
            height < 0.05
                ? ""
                : $"<rect class=\"rain\" x=\"{left}\" y=\"{MapView.Text(BarsTop + BarsHeight - height)}\" width=\"{wide}\" height=\"{MapView.Text(height)}\"/>";
        var reporting =
            $"<rect class=\"share\" x=\"{left}\" y=\"{MapView.Text(StripTop + (StripHeight * (1 - bar.Share)))}\" width=\"{MapView.Text(step)}\" height=\"{MapView.Text(StripHeight * bar.Share)}\"/>";
        var withheld =
            bar.Withheld == 0
                ? ""
                : $"<rect class=\"withheld\" x=\"{left}\" y=\"{MapView.Text(StripTop - 4)}\" width=\"{MapView.Text(Math.Max(1, step))}\" height=\"3\"/>";
        return rain + reporting + withheld;
    }

    private static string Label(double x, double y, string text, string anchor) =>
        $"<text class=\"gauge-label\" x=\"{MapView.Text(x)}\" y=\"{MapView.Text(y)}\" text-anchor=\"{anchor}\">{Html.Escape(text)}</text>";

    private sealed record Bar(double Depth, double Share, int Withheld)
    {
        public static Bar Of(ArealRainfall areal, int basin, int first, int count)
        {
            var values = Enumerable
                .Range(first, Math.Min(count, areal.Times.Count - first))
                .Select(t => areal.At(t, basin))
                .ToArray();
            return new Bar(
                values.Sum(value => value.DepthMillimetres ?? 0),
                values.Average(value => value.WeightReporting),
                values.Count(value => value.Status == ArealStatus.Withheld)
            );
        }
    }
}
