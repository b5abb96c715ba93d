using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Weights;

/// <summary>A sum that carries what each addition rounds off.</summary>
/// <remarks>A. Neumaier, Zeitschrift für angewandte Mathematik und Mechanik 54 (1974) 39-51.</remarks>
[StructLayout(LayoutKind.Auto)]
internal struct CompensatedSum
{
    private double sum;
    private double lost;

    public readonly double Value => sum + lost;

    public void Add(double term)
    {
        double next = sum + term;
        lost += Math.Abs(sum) >= Math.Abs(term) ? sum - next + term : term - next + sum;
        sum = next;
    }
}
