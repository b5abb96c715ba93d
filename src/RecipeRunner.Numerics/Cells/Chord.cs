using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// The part within a frame of the line that a wall lies on. Places on the line are distances in metres from the wall's
/// midpoint, growing counter-clockwise around the wall's site.
/// </summary>
/// <remarks>Y.-D. Liang, B. Barsky, "A new concept and method for line clipping", ACM Transactions on Graphics 3 (1984).</remarks>
[StructLayout(LayoutKind.Auto)]
internal readonly struct Chord
{
    private readonly Wall wall;
    private readonly Frame frame;

    public Chord(Wall wall, Frame frame)
    {
        this.wall = wall;
        this.frame = frame;
        EntryAt = double.NegativeInfinity;
        ExitAt = double.PositiveInfinity;
        (EntryAt, EntrySide, ExitAt, ExitSide) = Narrow(-wall.NormalY, wall.MidX, frame.MinX, frame.MaxX, 3, 1);
        (EntryAt, EntrySide, ExitAt, ExitSide) = Narrow(wall.NormalX, wall.MidY, frame.MinY, frame.MaxY, 0, 2);
    }

    public double EntryAt { get; }

    public double ExitAt { get; }

    public bool IsEmpty => !(EntryAt < ExitAt);

    public (double X, double Y) Entry => PointOn(EntryAt, EntrySide);

    public (double X, double Y) Exit => PointOn(ExitAt, ExitSide);

    /// <summary>The side of the frame where the line comes in: 0 lower, 1 right, 2 upper, 3 left.</summary>
    private int EntrySide { get; }

    private int ExitSide { get; }

    /// <summary>Where on the line a point beside it is.</summary>
    public double PlaceOf(double x, double y) => ((y - wall.MidY) * wall.NormalX) - ((x - wall.MidX) * wall.NormalY);

    private (double Entry, int EntrySide, double Exit, int ExitSide) Narrow(
        double speed,
        double from,
        double low,
        double high,
        int lowSide,
        int highSide
    )
    {
        if (speed == 0)
        {
            // Parallel to this pair of sides: all of the line is between them, or none.
            return from >= low && from <= high
                ? (EntryAt, EntrySide, ExitAt, ExitSide)
                : (double.PositiveInfinity, EntrySide, double.NegativeInfinity, ExitSide);
        }

        double atLow = (low - from) / speed;
        double atHigh = (high - from) / speed;
        (double entry, int entrySide, double exit, int exitSide) =
            speed > 0 ? (atLow, lowSide, atHigh, highSide) : (atHigh, highSide, atLow, lowSide);
        bool isLater = entry > EntryAt;
        bool isSooner = exit < ExitAt;
        return (
            isLater ? entry : EntryAt,
            isLater ? entrySide : EntrySide,
            isSooner ? exit : ExitAt,
            isSooner ? exitSide : ExitSide
        );
    }

    /// <summary>A point on a side of the frame, exactly on it and not beyond its ends.</summary>
    private (double X, double Y) PointOn(double place, int side)
    {
        double x = Math.Clamp(wall.MidX - (place * wall.NormalY), frame.MinX, frame.MaxX);
        double y = Math.Clamp(wall.MidY + (place * wall.NormalX), frame.MinY, frame.MaxY);
        return side switch
        {
            0 => (x, frame.MinY),
            1 => (frame.MaxX, y),
            2 => (x, frame.MaxY),
            _ => (frame.MinX, y),
        };
    }
}
