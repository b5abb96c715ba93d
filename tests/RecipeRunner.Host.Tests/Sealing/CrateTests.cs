using System.Text.Json;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Sealing;

/// <summary>
/// The crate keeps each MUST of the specifications that it names: RO-Crate 1.1, and the profiles Process, Workflow and Provenance Run
/// Crate 0.5 with Workflow RO-Crate 1.0. Each test names the section.
/// </summary>
public sealed class CrateTests : IDisposable
{
    private const string Recipe = """
        #load "lib/more.csx"
        Title("Letters");
        Source("a.txt", "The letters.", "CC0-1.0");
        Source("b.txt", "More letters.", "https://example.org/licence");
        Setting("with", "+");
        var a = Read("a.txt").Join(Read("b.txt")).Join(Read("a b.txt"));
        Write(a, "tables/ab.txt");
        """;

    private readonly Workbench bench = new();
    private readonly Dictionary<string, JsonElement> graph;

    public CrateTests()
    {
        bench.Write("lib/more.csx", "int One() => 1;");
        bench.WriteData("a b.txt", "gamma");
        bench.Run(Recipe, listAbove: 4);
        using var crate = JsonDocument.Parse(File.ReadAllBytes(CratePath));
        graph = crate
            .RootElement.GetProperty("@graph")
            .EnumerateArray()
            .ToDictionary(
                entity => entity.GetProperty("@id").GetString()!,
                entity => entity.Clone(),
                StringComparer.Ordinal
            );
    }

    private string CratePath => Path.Combine(bench.Study, "data/ro-crate-metadata.json");

    public void Dispose() => bench.Dispose();

    /// <summary>source: RO-Crate 1.1, "RO-Crate Metadata File Descriptor".</summary>
    [Fact]
    public void The_descriptor_describes_the_root()
    {
        var descriptor = graph["ro-crate-metadata.json"];
        Types(descriptor).ShouldBe(["CreativeWork"]);
        Links(descriptor, "about").ShouldBe(["./"]);
        Links(descriptor, "conformsTo").ShouldContain("https://w3id.org/ro/crate/1.1");
    }

    /// <summary>source: RO-Crate 1.1, "Direct properties of the Root Data Entity".</summary>
    [Fact]
    public void The_root_has_type_name_description_date_and_licence()
    {
        var root = graph["./"];
        Types(root).ShouldBe(["Dataset"]);
        root.GetProperty("name").GetString().ShouldBe("Letters");
        root.GetProperty("description").GetString().ShouldNotBeNullOrEmpty();
        root.GetProperty("datePublished").GetString()!.ShouldMatch("^\\d{4}-\\d{2}-\\d{2}$");
        var licence = graph[Links(root, "license").Single()];
        licence.GetProperty("name").GetString().ShouldNotBeNullOrEmpty();
        licence.GetProperty("description").GetString()!.ShouldContain("CC0-1.0");
    }

    /// <summary>source: RO-Crate 1.1, "Data Entities": files of the crate are linked from the root by hasPart, by percent-encoded paths.</summary>
    [Fact]
    public void Every_file_of_the_payload_is_a_part_and_every_part_that_is_a_file_is_there()
    {
        var payload = Path.Combine(bench.Study, "data");
        var files = Directory
            .EnumerateFiles(payload, "*", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(payload, path))
            .Where(path => path != "ro-crate-metadata.json");
        var parts = Links(graph["./"], "hasPart");

        parts.Select(Uri.UnescapeDataString).ShouldBe(files, ignoreOrder: true);
        parts.ShouldAllBe(part => Types(graph[part]).Contains("File"));
    }

    /// <summary>source: RO-Crate 1.1, "RO-Crate JSON-LD": flat; every reference leads to an entity of the graph.</summary>
    [Fact]
    public void Every_reference_leads_somewhere()
    {
        var addresses = new[] { "https://w3id.org/ro/crate/1.1", "https://learn.microsoft.com/dotnet/csharp/" };
        graph
            .Values.SelectMany(entity => entity.EnumerateObject())
            .SelectMany(property => References(property.Value))
            .Distinct(StringComparer.Ordinal)
            .Where(id => !graph.ContainsKey(id))
            .ShouldBeSubsetOf(addresses);
    }

    /// <summary>source: "conformsTo" in the requirements of the three Run Crate profiles 0.5: CreativeWork entities of their permalinks.</summary>
    [Theory]
    [InlineData("https://w3id.org/ro/wfrun/process/0.5")]
    [InlineData("https://w3id.org/ro/wfrun/workflow/0.5")]
    [InlineData("https://w3id.org/ro/wfrun/provenance/0.5")]
    [InlineData("https://w3id.org/workflowhub/workflow-ro-crate/1.0")]
    public void The_root_conforms_to_the_profile(string profile)
    {
        Links(graph["./"], "conformsTo").ShouldContain(profile);
        Types(graph[profile]).ShouldBe(["CreativeWork"]);
    }

    /// <summary>source: Workflow Run Crate 0.5, "Overview", and Provenance Run Crate 0.5, requirements of ComputationalWorkflow.</summary>
    [Fact]
    public void The_recipe_is_the_workflow()
    {
        Links(graph["./"], "mainEntity").ShouldBe(["recipe/recipe.csx"]);
        var workflow = graph["recipe/recipe.csx"];
        Types(workflow).ShouldBe(["File", "SoftwareSourceCode", "ComputationalWorkflow", "HowTo"]);
        Types(graph[Links(workflow, "programmingLanguage").Single()]).ShouldBe(["ComputerLanguage"]);
        var tools = Links(workflow, "hasPart").Where(id => Types(graph[id]).Contains("SoftwareApplication")).ToArray();
        tools
            .Select(id => graph[id].GetProperty("name").GetString())
            .ShouldBe(["Read words", "Join words", "Write words"]);
        Links(workflow, "hasPart").ShouldContain("recipe/lib/more.csx");
    }

    /// <summary>source: Workflow Run Crate 0.5: parameters are FormalParameters with a type; values refer to them by exampleOfWork.</summary>
    [Fact]
    public void Parameters_are_formal_and_values_refer_to_them()
    {
        var parameters = graph.Values.Where(entity => Types(entity).Contains("FormalParameter")).ToArray();
        parameters.Length.ShouldBeGreaterThan(8);
        parameters.ShouldAllBe(parameter => parameter.GetProperty("additionalType").GetString()!.Length > 0);
        var value = graph["#setting/with/value"];
        Types(value).ShouldBe(["PropertyValue"]);
        value.GetProperty("value").GetString().ShouldBe("+");
        Links(value, "exampleOfWork").ShouldBe(["#setting/with"]);
        Links(graph["recipe/recipe.csx"], "input").ShouldContain("#setting/with");
        Links(graph["tables/ab.txt"], "exampleOfWork").ShouldBe(["#output/tables/ab.txt".Replace("s/a", "s%2Fa")]);
    }

    /// <summary>source: Process Run Crate 0.5, requirements of CreateAction.</summary>
    [Fact]
    public void The_run_is_an_action_of_the_recipe_on_the_inputs()
    {
        var run = graph["#run"];
        Types(run).ShouldBe(["CreateAction"]);
        Links(graph["./"], "mentions").ShouldContain("#run");
        Links(run, "instrument").ShouldBe(["recipe/recipe.csx"]);
        Links(run, "object")
            .ShouldBe(["#listed/a%20b.txt", "#listed/a.txt", "inputs/b.txt", "#setting/with/value"], ignoreOrder: true);
        Links(run, "result").ShouldBe(["tables/ab.txt"]);
        run.GetProperty("endTime").GetString()!.ShouldMatch("^\\d{4}-\\d\\d-\\d\\dT\\d\\d:\\d\\d:\\d\\dZ$");
    }

    /// <summary>source: Provenance Run Crate 0.5, requirements of HowToStep, ControlAction, CreateAction and OrganizeAction.</summary>
    [Fact]
    public void Every_step_is_planned_controlled_and_carried_out()
    {
        var steps = Links(graph["recipe/recipe.csx"], "step").ToArray();
        steps.Length.ShouldBe(6);
        var controls = Links(graph["#run-of-the-tool"], "object").ToArray();
        Links(graph["#run-of-the-tool"], "result").ShouldBe(["#run"]);
        Types(graph[Links(graph["#run-of-the-tool"], "instrument").Single()]).ShouldBe(["SoftwareApplication"]);
        for (var i = 0; i < steps.Length; i++)
        {
            graph[steps[i]].GetProperty("position").GetString().ShouldBe($"{i + 1}");
            var tool = Links(graph[steps[i]], "workExample").Single();
            Types(graph[tool]).ShouldBe(["SoftwareApplication"]);
            Types(graph[controls[i]]).ShouldBe(["ControlAction"]);
            Links(graph[controls[i]], "instrument").ShouldBe([steps[i]]);
            var action = graph[Links(graph[controls[i]], "object").Single()];
            Types(action).ShouldBe(["CreateAction"]);
            Links(action, "instrument").ShouldBe([tool]);
        }
    }

    [Fact]
    public void Steps_are_tied_by_what_they_gave_with_its_digest()
    {
        Links(graph["#action/3"], "object")
            .ShouldBe(["#artifact/1", "#artifact/2", "#action/3/With", "#action/3/Strength"]);
        Links(graph["#action/1"], "object").ShouldBe(["#listed/a.txt", "#action/1/File"]);
        Links(graph["#action/6"], "result").ShouldBe(["#artifact/6", "tables/ab.txt"]);
        using var audit = JsonDocument.Parse(File.ReadAllBytes(Path.Combine(bench.Study, "data/audit.json")));
        graph["#artifact/3"]
            .GetProperty("sha256")
            .GetString()
            .ShouldBe(
                audit.RootElement.GetProperty("journal")[2].GetProperty("output").GetProperty("sha256").GetString()
            );
    }

    [Fact]
    public void Files_carry_the_sources_and_licences_that_the_recipe_states()
    {
        graph["#listed/a.txt"].GetProperty("description").GetString().ShouldBe("Source: The letters.");
        Types(graph["#listed/a.txt"]).ShouldBe(["CreativeWork"]);
        graph[Links(graph["#listed/a.txt"], "license").Single()].GetProperty("name").GetString().ShouldBe("CC0-1.0");
        Links(graph["inputs/b.txt"], "license").ShouldBe(["https://example.org/licence"]);
    }

    [Theory]
    [InlineData("\"name\": \"Letters\"", "\"name\": \"Lettres\"", Verdict.Differs)]
    [InlineData("\"datePublished\": \"2", "\"datePublished\": \"X2", Verdict.Differs)]
    [InlineData("\"endTime\": \"2", "\"endTime\": \"1", Verdict.Identical)]
    public void An_edited_crate_is_caught_by_a_rerun_but_for_its_dates(string was, string now, Verdict verdict)
    {
        var text = File.ReadAllText(CratePath);
        text.ShouldContain(was);
        File.WriteAllText(CratePath, text.Replace(was, now, StringComparison.Ordinal));
        bench.Reseal();

        bench.Rerun(data: bench.DataFolder).Verdict.ShouldBe(verdict);
    }

    private static IEnumerable<string> Types(JsonElement entity) =>
        entity.GetProperty("@type") is { ValueKind: JsonValueKind.Array } types
            ? types.EnumerateArray().Select(type => type.GetString()!)
            : [entity.GetProperty("@type").GetString()!];

    private static IEnumerable<string> Links(JsonElement entity, string property) =>
        References(entity.GetProperty(property));

    private static IEnumerable<string> References(JsonElement value) =>
        value.ValueKind switch
        {
            JsonValueKind.Array => value.EnumerateArray().SelectMany(References),
            JsonValueKind.Object => [value.GetProperty("@id").GetString()!],
            _ => [],
        };
}
