using System.Text.Json;
using RecipeRunner.EndToEnd.Tests.Running;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>
/// Studies are read by software made by others: Debian's python3-jsonschema, the npm packages ro-crate and jsonld
/// (tests/crate-reader), and sha256sum of coreutils.
/// </summary>
public sealed class OutsideCheckersTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    private const string Validate = """
        import json, sys
        from jsonschema import Draft202012Validator
        data = sys.argv[1]
        schema = json.load(open(f"{data}/audit.schema.json", encoding="utf-8"))
        Draft202012Validator.check_schema(schema)
        raw = open(f"{data}/audit.json", "rb").read()
        audit = json.loads(raw)
        complaints = [f"{list(e.absolute_path)}: {e.message}" for e in Draft202012Validator(schema).iter_errors(audit)]
        canonical = json.dumps(audit, sort_keys=True, separators=(",", ":"), ensure_ascii=False).encode("utf-8")
        worse = []
        for key in list(audit):
            worse.append({k: v for k, v in audit.items() if k != key})
        worse.append({**audit, "extra": 1})
        worse.append({**audit, "journal": [{**audit["journal"][0], "extra": 1}]})
        worse.append({**audit, "inputs": [{**audit["inputs"][0], "sha256": "0"}]})
        worse.append({**audit, "findings": [{**audit["findings"][0], "severity": "error"}]})
        missed = sum(Draft202012Validator(schema).is_valid(bad) for bad in worse)
        print(json.dumps({"complaints": complaints, "canonical": canonical == raw, "worse": len(worse), "missed": missed}))
        """;

    [Theory]
    [InlineData("monthly-totals")]
    [InlineData("one-storm")]
    [InlineData("wet-days")]
    public void Audits_are_valid_by_their_schema_which_refuses_others(string recipe)
    {
        using var tool = new Tool();
        tool.Run("run", DemoStudy.Recipe(recipe), "--data", DemoStudy.Data, "--quiet").ExitCode.ShouldBe(0);
        var said = tool.Command("/usr/bin/python3", "-c", Validate, tool.PathOf($"{recipe}.study/data"));
        said.ExitCode.ShouldBe(0, said.Errors);
        using var seen = JsonDocument.Parse(said.Output);
        var root = seen.RootElement;

        root.GetProperty("complaints").EnumerateArray().Select(text => text.GetString()).ShouldBeEmpty();
        root.GetProperty("worse").GetInt32().ShouldBeGreaterThan(20);
        root.GetProperty("missed").GetInt32().ShouldBe(0);
        root.GetProperty("canonical").GetBoolean().ShouldBeTrue("names are ASCII, so that Python's order is the RFC's");
    }

    [Fact]
    public void Software_for_crates_reads_the_crate_without_a_complaint()
    {
        using var tool = new Tool();
        var checker = Path.Combine(Tool.Repository, "tests", "crate-reader", "check.cjs");
        var said = tool.Command("node", checker, demo.PathOf(""));
        said.ExitCode.ShouldBe(0, said.Errors);
        using var seen = JsonDocument.Parse(said.Output);
        var root = seen.RootElement;

        root.GetProperty("complaints").EnumerateArray().Select(text => text.GetString()).ShouldBeEmpty();
        root.GetProperty("dangling")
            .EnumerateArray()
            .Select(reference => reference.GetString())
            .ShouldBe([
                "ro-crate-metadata.json conformsTo https://w3id.org/ro/crate/1.1",
                "#csharp url https://learn.microsoft.com/dotnet/csharp/",
            ]);
        root.GetProperty("workflow").GetString().ShouldBe("recipe/monthly-totals.csx");
        root.GetProperty("steps").GetInt32().ShouldBeGreaterThan(15);
        root.GetProperty("expanded").GetInt32().ShouldBeGreaterThan(100);
        root.GetProperty("results")
            .EnumerateArray()
            .Select(id => id.GetString())
            .ShouldContain("tables/areal-rainfall.csv");
        root.GetProperty("objects").EnumerateArray().Select(id => id.GetString()).ShouldContain("inputs/daily.csv");
    }
}
