using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Weights;

/// <summary>A sum that carries what each addition rounds off.</summary>
/// <remarks>D. E. Knuth, The Art of Computer Programming, volume 2, section 4.2.2, theorem B: the error of one addition.</remarks>
[StructLayout(LayoutKind.Auto)]
internal struct CompensatedSum
{
    private double sum;
    private double lost;

    public readonly double Value => sum + lost;

    public void Add(double term)
    {
        double next = sum + term;
        double added = next - sum;
        lost += (sum - (next - added)) + (term - added);
        sum = next;
    }
}
