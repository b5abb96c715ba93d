using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Cells;

/// <summary>An axis-parallel rectangle, in metres, that cells are cut to.</summary>
[StructLayout(LayoutKind.Auto)]
public readonly record struct Frame
{
    /// <summary>A rectangle from its lower left to its upper right corner.</summary>
    /// <exception cref="ArgumentException">A bound is not finite, or the rectangle has no width or no height.</exception>
    public Frame(double minX, double minY, double maxX, double maxY)
    {
        if (!(minX < maxX && minY < maxY && double.IsFinite(maxX - minX) && double.IsFinite(maxY - minY)))
        {
            throw new ArgumentException(
                FormattableString.Invariant(
                    $"A frame needs finite bounds, a width and a height; given x {minX:R} to {maxX:R}, y {minY:R} to {maxY:R}."
                ),
                nameof(minX)
            );
        }

        MinX = minX;
        MinY = minY;
        MaxX = maxX;
        MaxY = maxY;
    }

    /// <summary>Left edge.</summary>
    public double MinX { get; }

    /// <summary>Lower edge.</summary>
    public double MinY { get; }

    /// <summary>Right edge.</summary>
    public double MaxX { get; }

    /// <summary>Upper edge.</summary>
    public double MaxY { get; }

    /// <summary>Whether a point lies within, edges included.</summary>
    public bool Holds(double x, double y) => x >= MinX && x <= MaxX && y >= MinY && y <= MaxY;
}
