using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Tests.Referencing;

public sealed class AreaOfUseTests
{
    private static readonly AreaOfUse AcrossDateLine = new(172, 51, -130, 71);
    private static readonly AreaOfUse World = new(-180, -90, 180, 90);

    [Theory]
    [InlineData(180, 60, 0)]
    [InlineData(-180, 60, 0)]
    [InlineData(172, 51, 0)]
    [InlineData(-130, 71, 0)]
    [InlineData(170, 60, 2)]
    [InlineData(-127, 60, 3)]
    [InlineData(-150, 75, 4)]
    [InlineData(168, 50, 4)]
    public void Outside_is_counted_in_degrees(double lon, double lat, double outside) =>
        AcrossDateLine.Outside(new Location(lon, lat)).ShouldBe(outside, 1e-9);

    [Theory]
    [InlineData(-180)]
    [InlineData(180)]
    [InlineData(359)]
    public void Nothing_is_outside_the_world(double lon) => World.Outside(new Location(lon, 90)).ShouldBe(0);

    [Fact]
    public void Rectangles_meet_where_they_share_a_place()
    {
        AcrossDateLine.Meets(World).ShouldBeTrue();
        AcrossDateLine.Meets(new AreaOfUse(-140, 40, -100, 55)).ShouldBeTrue();
        AcrossDateLine.Meets(new AreaOfUse(160, 40, 171, 55)).ShouldBeFalse();
        AcrossDateLine.Meets(new AreaOfUse(175, 10, -175, 50)).ShouldBeFalse();
    }
}
