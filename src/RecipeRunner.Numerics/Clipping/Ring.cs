using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Clipping;

/// <summary>A ring and the origin from which its points are taken while it is worked on, so that digits are not lost far from zero.</summary>
[StructLayout(LayoutKind.Auto)]
internal readonly ref struct Ring
{
    private Ring(
        ReadOnlySpan<double> x,
        ReadOnlySpan<double> y,
        (double X, double Y) origin,
        (double X, double Y) subtracted
    )
    {
        X = x;
        Y = y;
        (OriginX, OriginY) = origin;
        (SubtractedX, SubtractedY) = subtracted;
    }

    public ReadOnlySpan<double> X { get; }

    public ReadOnlySpan<double> Y { get; }

    /// <summary>Easting of the origin, in metres.</summary>
    public double OriginX { get; }

    /// <summary>Northing of the origin, in metres.</summary>
    public double OriginY { get; }

    /// <summary>What makes an offset from the origin of a number in <see cref="X"/>, taken off.</summary>
    public double SubtractedX { get; }

    /// <summary>What makes an offset from the origin of a number in <see cref="Y"/>, taken off.</summary>
    public double SubtractedY { get; }

    /// <summary>A ring of coordinates; the origin is its first point.</summary>
    public static Ring Of(ReadOnlySpan<double> x, ReadOnlySpan<double> y) => new(x, y, (x[0], y[0]), (x[0], y[0]));

    /// <summary>A ring of offsets from an origin.</summary>
    public static Ring About(double originX, double originY, ReadOnlySpan<double> x, ReadOnlySpan<double> y) =>
        new(x, y, (originX, originY), (0, 0));
}
