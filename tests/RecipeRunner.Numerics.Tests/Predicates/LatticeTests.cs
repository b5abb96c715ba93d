using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Numerics.Tests.Predicates;

/// <summary><i>common practice, no source:</i> rounding to the nearest multiple of a power of two, halves to even.</summary>
public sealed class LatticeTests
{
    [Theory]
    [InlineData(0.0, 0.0)]
    [InlineData(1.5 / 65536, 2.0 / 65536)]
    [InlineData(2.5 / 65536, 2.0 / 65536)]
    [InlineData(-0.4 / 65536, 0.0)]
    [InlineData(500000.00001, 500000.0 + (1.0 / 65536))]
    [InlineData(67108864.0, 67108864.0)]
    public void Snaps_to_the_nearest_point(double metres, double expected)
    {
        double snapped = Lattice.Snap(metres);
        BitConverter.DoubleToInt64Bits(snapped).ShouldBe(BitConverter.DoubleToInt64Bits(expected));
        Lattice.Holds(snapped).ShouldBeTrue();
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    [InlineData(67108864.0001)]
    [InlineData(-1e9)]
    public void Refuses_what_is_beyond_its_reach(double metres)
    {
        Should.Throw<ArgumentOutOfRangeException>(() => Lattice.Snap(metres)).ActualValue.ShouldBe(metres);
        Lattice.Holds(metres).ShouldBeFalse();
    }

    [Fact]
    public void Holds_only_its_own_points() => Lattice.Holds(0.1).ShouldBeFalse();
}
