using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Weights;

/// <summary>What a ring has in one cell, while it is added up; coordinates are offsets from the ring's origin.</summary>
[StructLayout(LayoutKind.Auto)]
internal struct Piece(int site, double aboutX, double aboutY)
{
    /// <summary>Rank of the site whose cell it is.</summary>
    public int Site { get; } = site;

    /// <summary>The point of the piece about which areas are swept.</summary>
    public double AboutX { get; } = aboutX;

    /// <summary>The point of the piece about which areas are swept.</summary>
    public double AboutY { get; } = aboutY;

    public double TwiceArea { get; private set; }

    /// <summary>
    /// What the rounding error of <see cref="TwiceArea"/> is measured by: lengths times the size of the coordinates they
    /// were computed from.
    /// </summary>
    public double Magnitude { get; private set; }

    public void Add(double twiceArea, double magnitude)
    {
        TwiceArea += twiceArea;
        Magnitude += magnitude;
    }
}
