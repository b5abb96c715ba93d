using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Says what projecting a layer rests on.</summary>
internal static class DatumReport
{
    /// <summary>States the datum operation and the directions of axes, and finds what deserves a look.</summary>
    public static void Report(GridTransform transform, StepContext context, string file)
    {
        context.State("datum", transform.Operation.Text);
        context.State("axes", AxesOf(transform.Target));
        if (transform.Operation.IsTakenAsIs)
        {
            context.Find(
                Finding.Caution(
                    "RR0321",
                    new Place(file),
                    $"The datum was disregarded, as the recipe accepts: {transform.Operation.Text}.",
                    "Bring the data to the target's datum with a published operation where that error matters."
                )
            );
        }
    }

    private static string AxesOf(KnownSystem system) =>
        system.Definition.Form?.Axes switch
        {
            null => "x longitude, y latitude, degrees",
            PlaneAxes.WestSouth => "x west, y south, metres",
            PlaneAxes.SouthWest => "x south, y west, metres",
            _ => "x east, y north, metres",
        };
}
