using NetTopologySuite.Algorithm.Locate;
using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Answers;

/// <summary>Finds basins that lie within others: those of which a point well inside is inside another.</summary>
internal static class NestedBasins
{
    /// <summary>Each in words, such as <c>B-6 in B-2</c>.</summary>
    public static string[] Of(Basin[] basins)
    {
        var shapes = basins.Select(basin => RegionGeometry.Of(basin.Shape)).ToArray();
        var locators = shapes.Select(shape => new IndexedPointInAreaLocator(shape)).ToArray();
        var nested = new List<string>();
        for (var inner = 0; inner < basins.Length; inner++)
        {
            var point = shapes[inner].InteriorPoint.Coordinate;
            for (var outer = 0; outer < basins.Length; outer++)
            {
                if (
                    outer != inner
                    && shapes[outer].EnvelopeInternal.Contains(point)
                    && locators[outer].Locate(point) == NetTopologySuite.Geometries.Location.Interior
                    && shapes[outer].Area >= shapes[inner].Area
                )
                {
                    nested.Add($"{basins[inner].Id} in {basins[outer].Id}");
                }
            }
        }

        return [.. nested];
    }
}
