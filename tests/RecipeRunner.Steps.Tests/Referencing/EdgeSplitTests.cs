using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Tests.Referencing;

public sealed class EdgeSplitTests
{
    [Fact]
    public void Pieces_are_equal()
    {
        var inner = new Location[3];
        EdgeSplit.Divide(new Location(0, 0), new Location(8, 4), isGeographic: false, inner);

        inner.ShouldBe([new(2, 1), new(4, 2), new(6, 3)]);
    }

    [Fact]
    public void Neighbours_get_the_same_places_bit_for_bit()
    {
        var random = new Random(7);
        for (var i = 0; i < 1000; i++)
        {
            var (start, end) = (Anywhere(random), Anywhere(random));
            var (there, back) = (new Location[9], new Location[9]);
            EdgeSplit.Divide(start, end, isGeographic: true, there);
            EdgeSplit.Divide(end, start, isGeographic: true, back);

            back.Reverse().ShouldBe(there);
        }
    }

    [Fact]
    public void Degrees_take_the_shorter_way_round()
    {
        var inner = new Location[1];
        EdgeSplit.Divide(new Location(179, 10), new Location(-179, 12), isGeographic: true, inner);

        Math.Abs(inner[0].X).ShouldBe(180);
        inner[0].Y.ShouldBe(11);
    }

    private static Location Anywhere(Random random) => new((random.NextDouble() * 20) - 10, random.NextDouble() * 60);
}
