using System.Globalization;
using System.Text.Json.Nodes;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Tracing;

/// <summary>A trace for machines.</summary>
public static class TraceDocument
{
    /// <summary>The hand-check table as lines of CSV, a line a gauge, those that were silent with a weight of 0.</summary>
    public static IEnumerable<string> Csv(ValueTrace trace) =>
        trace
            .Account.Shares.Select(share =>
                (string[])
                    [
                        share.Gauge,
                        Number(share.DepthMillimetres),
                        share.Status.Word(),
                        Number(share.DistanceMetres),
                        Number(share.AreaSquareMetres),
                        Number(share.Weight),
                        Number(share.ProductMillimetres),
                    ]
            )
            .Concat(
                trace.Account.Silent.Select(silent =>
                    (string[])[silent.Gauge, "", silent.Status.Word(), "", "0", "0", "0"]
                )
            )
            .Prepend(["gauge", "depth_mm", "status", "distance_m", "area_m2", "weight", "product_mm"])
            .Select(CsvLine.Of);

    /// <summary>All of the trace as JSON.</summary>
    public static string Json(ValueTrace trace) =>
        JsonFile.Text(
            new JsonObject
            {
                ["title"] = trace.Title,
                ["basin"] = trace.Basin,
                ["area_m2"] = trace.AreaSquareMetres,
                ["start"] = trace.Interval.StartText,
                ["end"] = trace.Interval.EndText,
                ["depth_mm"] = trace.Value.DepthMillimetres,
                ["weight_reporting"] = trace.Value.WeightReporting,
                ["gauges"] = Array(
                    trace.Account.Shares.Select(share => new JsonObject
                    {
                        ["gauge"] = share.Gauge,
                        ["depth_mm"] = share.DepthMillimetres,
                        ["status"] = share.Status.Word(),
                        ["distance_m"] = share.DistanceMetres,
                        ["area_m2"] = share.AreaSquareMetres,
                        ["weight"] = share.Weight,
                        ["product_mm"] = share.ProductMillimetres,
                    })
                ),
                ["silent"] = Array(
                    trace.Account.Silent.Select(silent => new JsonObject
                    {
                        ["gauge"] = silent.Gauge,
                        ["status"] = silent.Status.Word(),
                        ["area_m2"] = silent.AreaSquareMetres,
                        ["weight"] = silent.Weight,
                    })
                ),
                ["steps"] = Array(
                    trace.Steps.Select(entry => new JsonObject
                    {
                        ["step"] = entry.Number,
                        ["title"] = entry.Title,
                        ["line"] = entry.Line.ToString(),
                        ["settings"] = new JsonObject(
                            entry.Settings.Select(setting => KeyValuePair.Create(setting.Name, (JsonNode?)setting.Text))
                        ),
                        ["sha256"] = entry.Output.Digest,
                    })
                ),
                ["origins"] = Array(
                    trace.Origins.Select(origin => new JsonObject
                    {
                        ["gauge"] = origin.Gauge,
                        ["steps"] = Array(origin.Steps.Select(entry => JsonValue.Create(entry.Number))),
                        ["cells"] = Array(
                            origin.Cells.Select(cell => new JsonObject
                            {
                                ["file"] = cell.Where.File,
                                ["line"] = cell.Where.Line,
                                ["column"] = cell.Where.Column,
                                ["text"] = cell.Text,
                            })
                        ),
                    })
                ),
                ["layers"] = Array(trace.Layers.Select(layer => JsonValue.Create(layer))),
            }
        );

    private static JsonArray Array(IEnumerable<JsonNode?> nodes) => new([.. nodes]);

    private static string Number(double number) => number.ToString("R", CultureInfo.InvariantCulture);
}
