using RecipeRunner.Host.Tests.Support;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Running;

public sealed class SettingsTests : IDisposable
{
    private const string Recipe =
        "var year = Setting(\"year\", 2024);\nvar share = Setting(\"share\", 0.5);\nvar deep = Setting(\"deep\", false);\nNote($\"{year} {share > 0.6} {deep}\");\n";
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Defaults_hold_where_nothing_is_given()
    {
        var record = bench.Run(Recipe).Record;

        record.Notes.ShouldBe(["2024 False False"]);
        record.Settings.ShouldBe([new("year", "2024", true), new("share", "0.5", true), new("deep", "no", true)]);
    }

    [Fact]
    public void Given_values_take_their_place_and_are_journalled()
    {
        var record = bench.Run(Recipe, settings: [("year", "1999"), ("share", "0.75"), ("deep", "yes")]).Record;

        record.Notes.ShouldBe(["1999 True True"]);
        record.Settings.ShouldAllBe(setting => !setting.IsDefault);
    }

    [Theory]
    [InlineData("yaer", "2000", "year")]
    [InlineData("year", "2000.5", "")]
    [InlineData("share", "0,5", "")]
    [InlineData("share", "NaN", "")]
    [InlineData("deep", "maybe", "")]
    public void What_does_not_fit_is_refused_and_nothing_is_left(string name, string value, string near)
    {
        var failure = Should.Throw<Exception>(() => bench.Run(Recipe, settings: [(name, value)]));

        var problem = failure is RefusedException refused
            ? refused.Problems[0]
            : ((Host.Scripting.RecipeException)failure).Problems[0].Problem;
        problem.Code.ShouldBe("RR0111");
        problem.Where.Item.ShouldBe($"setting {name}");
        problem.Mend.ShouldContain(near);
        bench.Leftovers().ShouldBeEmpty();
    }
}
