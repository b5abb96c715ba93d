using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>The lattice of 2^-16 m (about 0.015 mm) on which all coordinates of a working grid lie.</summary>
internal static class LatticeSnap
{
    private const double StepsInMetre = 65536;

    /// <summary>The nearest lattice place; coordinates in metres, below 2^36 so that the result is exact.</summary>
    public static Location Snap(Location place) => new(Snap(place.X), Snap(place.Y));

    private static double Snap(double metres) => Math.Round(metres * StepsInMetre) / StepsInMetre;
}
