using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>Sets of sites, as ascending ranks, are equal when they hold the same.</summary>
internal sealed class SilentSets : IEqualityComparer<int[]>
{
    public static SilentSets Comparer { get; } = new();

    public bool Equals(int[]? x, int[]? y) => x.AsSpan().SequenceEqual(y);

    public int GetHashCode(int[] obj)
    {
        var hash = default(HashCode);
        hash.AddBytes(MemoryMarshal.AsBytes(obj.AsSpan()));
        return hash.ToHashCode();
    }
}
