namespace RecipeRunner.Numerics.Predicates;

/// <summary>
/// The binary lattice on which all gauges stand: multiples of 2⁻¹⁶ m (about 0.015 mm), at most 2²⁶ m from zero.
/// Doubles hold its points, and all differences of two of them, without rounding; this is what makes the predicates exact.
/// </summary>
public static class Lattice
{
    /// <summary>Distance between neighbouring lattice lines, in metres.</summary>
    public const double StepMetres = 1.0 / StepsPerMetre;

    /// <summary>Largest magnitude of a coordinate, in metres, included: 2²⁶, more than the Earth's circumference.</summary>
    public const double ReachMetres = 1 << 26;

    private const double StepsPerMetre = 1 << 16;

    /// <summary>The lattice coordinate nearest to <paramref name="metres"/>; halves go to the even multiple.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not a number, or beyond <see cref="ReachMetres"/>.</exception>
    public static double Snap(double metres)
    {
        if (!(Math.Abs(metres) <= ReachMetres))
        {
            throw new ArgumentOutOfRangeException(
                nameof(metres),
                metres,
                "A coordinate must be a number of metres between -67108864 and 67108864."
            );
        }

        // Adding zero turns a negative zero into a plain one, so that equal coordinates have equal bits.
        return (Math.Round(metres * StepsPerMetre, MidpointRounding.ToEven) / StepsPerMetre) + 0.0;
    }

    /// <summary>Whether <paramref name="metres"/> is a coordinate of the lattice: a multiple of the step, within reach.</summary>
    public static bool Holds(double metres) =>
        Math.Abs(metres) <= ReachMetres && Math.Floor(metres * StepsPerMetre) == metres * StepsPerMetre;

    /// <summary>A lattice length, or a difference of two coordinates, as a whole number of steps.</summary>
    internal static long Steps(double metres) => (long)(metres * StepsPerMetre);
}
