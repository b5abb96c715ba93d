using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Tests.Series;

public sealed class CountedTests
{
    [Fact]
    public void One_thing_is_told_otherwise_than_none_or_several()
    {
        Counted.Of(1, "value is", "values are").ShouldBe("1 value is");
        Counted.Of(0, "value is", "values are").ShouldBe("0 values are");
        Counted.Of(1200, "gauge").ShouldBe("1,200 gauges");
        (Counted.Times(1), Counted.Times(2)).ShouldBe(("once", "2 times"));
    }

    [Fact]
    public void Steps_of_every_kind_are_counted_in_words()
    {
        TimeStep.Days("09:00", "+01:00").Words(1).ShouldBe("1 day ending 09:00 at UTC+01:00");
        TimeStep.Hours().Words(1).ShouldBe("1 hour");
        TimeStep.Hours(6, datedByStart: true).Words(1).ShouldBe("1 step of 6 hours dated by their start");
        TimeStep.Months.Words(1).ShouldBe("1 month");
        TimeStep.WaterYears(10).Words(1).ShouldBe("1 water year from month 10");
        TimeStep.Minutes(5).Words(288).ShouldBe("288 steps of 5 minutes");
    }
}
