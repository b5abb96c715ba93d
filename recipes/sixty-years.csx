// Sixty years of gappy daily rain over the invented Quellmark: how much fell, which storms and maxima stand out, and does
// the way of handling silent gauges matter?
//
//   recipe-runner run recipes/sixty-years.csx --data data-demo
//
// Gauges opened and closed, fell silent for days or months, and some were read on Mondays for three days at once.
// A share of the full network's weight says little where the full network never stood, so a day's value is given wherever
// a gauge within some distance reported. The table gap-policies shows, basin by basin and season by season, where the
// three gap policies part.
// Settings: within-km (15), water-year-starts (10), storm-mm (40)
var waterYear = Every.WaterYear(firstMonth: Setting("water-year-starts", 10));
var enough = Within.Kilometres(Setting("within-km", 15.0));
Title("Quellmark: sixty years of daily rain, 1964 to 2024");
Note("Invented data for demonstration; nothing here was measured.");
Source("*", "Invented for demonstration, made by data-demo/generate.py.", licence: "CC0-1.0");

var grid = Crs("EPSG:32633");
var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME").To(grid);
var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326")).To(grid);
var rain = ReadRecords(
        "daily-sixty-years.csv.gz",
        unit: RainUnit.Millimetres,
        step: TimeStep.Days(endingAt: "09:00"),
        missing: ["-9999"],
        trace: ["T"],
        accumulating: ["A"]
    )
    .SpreadAccumulations(gauges);

var weights = basins.WeighBy(gauges.ThiessenCells());
EmitTable(weights, "weights");
EmitTable(weights.ComparePolicies(rain, reporting: enough), "gap-policies");

// The same rain under each policy, summed over water years.
foreach (var gaps in new[] { GapPolicy.Redraw, GapPolicy.Rescale, GapPolicy.Withhold })
{
    var series = weights.MeanRain(rain, gaps, reporting: enough);
    var name = gaps.ToString().ToLowerInvariant();
    EmitTable(series.Total(waterYear, complete: AtLeast.Percent(95)), $"water-years-{name}");
}

// From here on Redraw: every day has the cells of those gauges that reported on it.
var areal = weights.MeanRain(rain, GapPolicy.Redraw, reporting: enough);
EmitLayer(basins.With(areal.Total(complete: AtLeast.Percent(95))), "basins");
EmitLayer(gauges, "gauges");
EmitTable(areal, "areal-rainfall");
EmitTable(areal.Total(Every.Season, complete: AtLeast.Percent(90)), "seasons");
EmitTable(areal.Total(waterYear, complete: AtLeast.Percent(95)).Completeness(), "water-years-completeness");

var maxima = areal.AnnualMaxima([1, 2, 3, 5], waterYear, complete: AtLeast.Percent(95));
EmitTable(maxima, "annual-maxima");
EmitTable(maxima.Completeness(), "annual-maxima-years");

var storms = areal.Storms(dryFor: 2, atLeast: Setting("storm-mm", 40.0), wetFrom: 1);
EmitTable(storms, "storms");
EmitTable(storms.Gauges(rain), "storm-gauges");
if (storms.Storms.Length > 0)
{
    var wettest = Enumerable.Range(1, storms.Storms.Length).MaxBy(n => storms.Storms[n - 1].MeanDepthMillimetres);
    EmitTable(storms.DepthArea(wettest, basins: ["B-1", "B-2", "B-3", "B-4", "B-5"]), "depth-area");
}
