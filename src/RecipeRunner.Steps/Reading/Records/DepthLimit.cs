using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>
/// The most rain that was ever measured anywhere, by duration (WMO world records; from memory). Rain in a shorter time cannot
/// be more than the record of a longer one, so a step's limit is the record of the next duration that is as long.
/// </summary>
internal static class DepthLimit
{
    private static readonly (double Hours, double Millimetres)[] Records =
    [
        (1.0 / 60, 38), // Barot, Guadeloupe, 1970
        (8.0 / 60, 126), // Füssen, 1920
        (15.0 / 60, 198), // Plumb Point, Jamaica, 1916
        (20.0 / 60, 206), // Curtea de Argeș, 1889
        (1, 305), // Holt, Missouri, 1947, in 42 minutes
        (2.75, 559), // D'Hanis, Texas, 1935
        (4.5, 782), // Smethport, Pennsylvania, 1942
        (12, 1144), // Foc-Foc, La Réunion, 1966
        (24, 1825), // Foc-Foc, La Réunion, 1966
        (48, 2493), // Cherrapunji, 1995
        (72, 3930), // Commerson, La Réunion, 2007
        (96, 4936), // Commerson, La Réunion, 2007
        (31 * 24, 9300), // Cherrapunji, July 1861
        (366 * 24, 26470), // Cherrapunji, August 1860 to July 1861
    ];

    /// <summary>Millimetres that a step of this length has never held.</summary>
    /// <param name="interval">The step.</param>
    public static double Of(RainInterval interval)
    {
        var hours = interval.Hours;
        return Array.Find(Records, record => record.Hours >= hours - 1e-9) is { Hours: > 0 } found
            ? found.Millimetres
            : Records[^1].Millimetres;
    }
}
