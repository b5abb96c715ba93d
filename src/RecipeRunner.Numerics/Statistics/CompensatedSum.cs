using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Statistics;

/// <summary>A sum that carries what each addition rounds off.</summary>
/// <remarks>D. E. Knuth, The Art of Computer Programming, volume 2, section 4.2.2, theorem B: the error of one addition.</remarks>
[StructLayout(LayoutKind.Auto)]
public struct CompensatedSum
{
    private double sum;
    private double lost;

    /// <summary>The sum so far.</summary>
    public readonly double Value => sum + lost;

    /// <summary>Adds a finite number.</summary>
    public void Add(double term)
    {
        double next = sum + term;
        double added = next - sum;
        lost += (sum - (next - added)) + (term - added);
        sum = next;
    }
}
