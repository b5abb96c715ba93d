using System.Text;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>
/// GHCN-Daily files that do not follow their format are refused at the place; source of the format: NOAA GHCN-Daily readme.txt,
/// section III, and readme-by_year.txt.
/// </summary>
public sealed class GhcnDamageTests : IDisposable
{
    private const string Station = DlyRow.Station;
    private static readonly TimeStep Morning = TimeStep.Days(endingAt: "07:00");
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData("RR0278", 2, 0, "cut")]
    [InlineData("RR0279", 2, 22, "value")]
    [InlineData("RR0279", 2, 12, "year")]
    [InlineData("RR0279", 2, 12, "month")]
    [InlineData("RR0279", 2, 254, "30 February")]
    [InlineData("RR0279", 2, 22, "less than zero")]
    [InlineData("RR0255", 2, 22, "twice")]
    public void Damage_in_a_fixed_row_is_refused_at_its_place(string code, int line, int column, string damage)
    {
        var first = DlyRow.Of(2023, 2, "PRCP", (1, "   10  7"));
        var row = damage switch
        {
            "cut" => DlyRow.Of(2024, 2, "PRCP")[..^1],
            "value" => DlyRow.Of(2024, 2, "PRCP", (1, "  1O0  7")),
            "year" => DlyRow.Of(2024, 2, "PRCP").Replace("202402", "20x402", StringComparison.Ordinal),
            "month" => DlyRow.Of(2024, 13, "PRCP"),
            "30 February" => DlyRow.Of(2024, 2, "PRCP", (30, "    1  7")),
            "less than zero" => DlyRow.Of(2024, 2, "PRCP", (1, "   -1  7")),
            _ => first,
        };
        bench.Write("a.dly", first + "\n" + row + "\n");
        var problem = Bench.Refused(() => bench.Verbs.ReadGhcnDaily("a.dly", Morning))[0];

        (problem.Code, problem.Where.Line, problem.Where.Column).ShouldBe((code, line, column));
        problem.Mend.ShouldNotBeEmpty();
    }

    [Theory]
    [InlineData("USC00026481,20240101,PRCP,1,,,7\n", "RR0278", 0)]
    [InlineData("USC00026481,20240230,PRCP,1,,,7,\n", "RR0279", 2)]
    [InlineData("USC00026481,2024-01-01,PRCP,1,,,7,\n", "RR0279", 2)]
    [InlineData("USC00026481,20240101,PRCP,1.5,,,7,\n", "RR0279", 4)]
    [InlineData("USC00026481,20240101,PRCP,-1,,,7,\n", "RR0279", 4)]
    [InlineData("USC00026481,20240101,PRCP,1,TT,,7,\n", "RR0279", 5)]
    [InlineData("USC26481,20240101,PRCP,1,,,7,\n", "RR0279", 1)]
    [InlineData("USC00026481,20240102,PRCP,1,,,7,\n", "RR0255", 4)]
    [InlineData("USC00026481,20240103,MDPR,1,,,7,\nUSC00026481,20240103,MDPR,2,,,7,\n", "RR0255", 4)]
    public void Damage_in_a_row_of_one_value_is_refused_at_its_place(string rows, string code, int column)
    {
        bench.Write("2024.csv", "USC00026481,20240102,PRCP,3,,,7,\n" + rows);
        var problem = Bench.Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", Morning))[0];

        (problem.Code, problem.Where.Column).ShouldBe((code, column));
        problem.Where.Line.ShouldBeGreaterThan(1);
    }

    [Theory]
    [InlineData("date,A\n2024-01-01,1\n", "RR0285")]
    [InlineData("", "RR0201")]
    [InlineData("USC00026481,20240101,TMAX,1,,,7,\n", "RR0287")]
    public void Other_files_are_refused(string text, string code)
    {
        bench.Write("a.csv", text);

        Bench.Refused(() => bench.Verbs.ReadGhcnDaily("a.csv", Morning))[0].Code.ShouldBe(code);
    }

    [Fact]
    public void Only_days_can_be_read()
    {
        bench.Write("2024.csv", $"{Station},20240101,PRCP,1,,,7,\n");

        Bench.Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", TimeStep.Hours()))[0].Code.ShouldBe("RR0286");
        Bench.Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", TimeStep.Months))[0].Code.ShouldBe("RR0286");
    }

    [Fact]
    public void Bytes_changed_at_random_are_refused_or_read_and_nothing_else()
    {
        var rows = new[] { "PRCP", "MDPR", "DAPR" }
            .Select(element => DlyRow.Of(2024, 1, element, (3, "    2  7")))
            .ToArray();
        var random = new Random(20240109);
        var good = Encoding.ASCII.GetBytes(string.Join('\n', rows) + "\n");
        var refused = 0;
        for (var round = 0; round < 400; round++)
        {
            var bytes = good.ToArray();
            bytes[random.Next(bytes.Length)] = (byte)random.Next(256);
            bench.Write("a.dly", bytes);
            try
            {
                bench.Verbs.ReadGhcnDaily("a.dly", Morning).DepthsAt(0)[0].ShouldBeInRange(0, 10_000);
            }
            catch (Model.Steps.RefusedException refusal)
            {
                refused++;
                refusal.Problems[0].Where.File.ShouldBe("a.dly");
            }
        }

        refused.ShouldBeGreaterThan(100);
    }
}
