using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Triangulation;

/// <summary>
/// Places on the Hilbert curve of order 24 over a square: points near on the curve are near in the plane, so sites put
/// in this order are found, and kept in the machine's cache, together.
/// </summary>
/// <remarks>
/// D. Hilbert, Mathematische Annalen 38 (1891) 459-460. Four levels a step through a table of the curve's four
/// attitudes.
/// </remarks>
[StructLayout(LayoutKind.Auto)]
internal readonly struct HilbertCurve
{
    /// <summary>Bits of a key: two a level.</summary>
    public const int KeyBits = 2 * Levels;

    private const int Levels = 24;
    private const int LevelsAStep = 4;
    private const int Cells = 1 << Levels;
    private static readonly ushort[] Table = BuildTable();
    private readonly double left;
    private readonly double bottom;
    private readonly double cellsPerMetre;

    /// <summary>The curve over the smallest square at the lower left that holds all the points, of which there is one at least.</summary>
    public HilbertCurve(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        (left, double right) = Range(x);
        (bottom, double top) = Range(y);
        double side = Math.Max(right - left, top - bottom);
        cellsPerMetre = side > 0 ? (Cells - 1) / side : 0;
    }

    /// <summary>Where on the curve a point lies; points outside the square count as moved to its edge.</summary>
    public ulong KeyOf(double x, double y)
    {
        int column = (int)Math.Clamp((x - left) * cellsPerMetre, 0, Cells - 1);
        int row = (int)Math.Clamp((y - bottom) * cellsPerMetre, 0, Cells - 1);
        int attitude = 0;
        ulong key = 0;
        for (int shift = Levels - LevelsAStep; shift >= 0; shift -= LevelsAStep)
        {
            int entry = Table[(attitude << 8) | (((column >> shift) & 15) << 4) | ((row >> shift) & 15)];
            key = (key << (2 * LevelsAStep)) | (uint)(entry & 255);
            attitude = entry >> 8;
        }

        return key;
    }

    private static (double Low, double High) Range(ReadOnlySpan<double> values)
    {
        double low = values[0];
        double high = values[0];
        foreach (double value in values)
        {
            low = Math.Min(low, value);
            high = Math.Max(high, value);
        }

        return (low, high);
    }

    /// <summary>Entry (attitude, four bits of column, four bits of row): eight bits of key, and the next attitude above them.</summary>
    private static ushort[] BuildTable()
    {
        var table = new ushort[4 * 256];
        for (int index = 0; index < table.Length; index++)
        {
            int attitude = index >> 8;
            int key = 0;
            for (int bit = LevelsAStep - 1; bit >= 0; bit--)
            {
                int x = (index >> (4 + bit)) & 1;
                int y = (index >> bit) & 1;
                (int quadrant, attitude) = Descend(attitude, x, y);
                key = (key << 2) | quadrant;
            }

            table[index] = (ushort)((attitude << 8) | key);
        }

        return table;
    }

    /// <summary>
    /// One level: attitude bit 0 says that x and y are exchanged, bit 1 that both are reversed; in the plain attitude
    /// the curve visits (0,0), (0,1), (1,1), (1,0), exchanged in the first quadrant, exchanged and reversed in the last.
    /// </summary>
    private static (int Quadrant, int Attitude) Descend(int attitude, int x, int y)
    {
        if ((attitude & 2) != 0)
        {
            (x, y) = (1 - x, 1 - y);
        }

        if ((attitude & 1) != 0)
        {
            (x, y) = (y, x);
        }

        int quadrant = (2 * x) + (x ^ y);
        int next = quadrant switch
        {
            0 => attitude ^ 1,
            3 => attitude ^ 3,
            _ => attitude,
        };
        return (quadrant, next);
    }
}
