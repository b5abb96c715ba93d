using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Emitting;

/// <summary>
/// Writes a layer into the study. A name that ends in <c>.geojson</c> gives GeoJSON (RFC 7946: longitude and latitude on
/// WGS 84); any other gives a shapefile in the layer's own reference system, with <c>.prj</c> and <c>.cpg</c>.
/// </summary>
/// <param name="Layer">What to write: basins, gauges, cells, pieces, triangles.</param>
/// <param name="Name">The layer's name, such as <c>cells</c> or <c>cells.geojson</c>.</param>
/// <example><code>EmitLayer(cells.CutTo(basins), "thiessen-cells");</code></example>
[Step("Emit layer", Word = "layer")]
public sealed record EmitLayerStep(IMapLayer Layer, string Name) : Step<EmittedFiles>
{
    private const string GeoJsonEnding = ".geojson";

    /// <inheritdoc/>
    public override EmittedFiles Execute(StepContext context)
    {
        var features = Layer.ToFeatures();
        var paths = Name.EndsWith(GeoJsonEnding, StringComparison.OrdinalIgnoreCase)
            ? GeoJsonLayer.Write(
                context,
                Name[..^GeoJsonEnding.Length] + GeoJsonEnding,
                features,
                Layer.ReferenceSystem
            )
            : ShapefileLayer.Write(context, EmittedName.Without(Name, ".shp"), features, Layer.ReferenceSystem);
        return new EmittedFiles([.. paths], features.Shapes.Length, "features");
    }
}
