using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Scripting;

/// <summary>Errors name the recipe's file, line and column. Ids, not wording, are asserted.</summary>
public sealed class RecipeDiagnosticsTests : IDisposable
{
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_misspelt_verb_is_placed_and_near_names_are_offered()
    {
        var problem = bench.Fail("var a = Read(\"a.txt\");\nvar b = Raed(\"b.txt\");\n");

        problem.Problem.Code.ShouldBe("CS0103");
        (problem.Line!.Value.Line, problem.Line.Value.Column).ShouldBe((2, 9));
        problem.Line.Value.File.ShouldEndWith("recipe.csx");
        problem.Source.ShouldBe("var b = Raed(\"b.txt\");");
        problem.Length.ShouldBe("Raed".Length);
        problem.Problem.Mend.ShouldContain("Read");
    }

    [Fact]
    public void A_misspelt_extension_verb_offers_those_of_its_type()
    {
        var problem = bench.Fail("Read(\"a.txt\").Jion(Read(\"b.txt\"));");

        problem.Problem.Code.ShouldBe("CS1061");
        problem.Problem.Mend.ShouldContain("Join");
    }

    [Fact]
    public void All_errors_are_reported_at_once_in_the_order_of_the_text()
    {
        var problems = Should.Throw<RecipeException>(() => bench.Run("Foo();\nint x = \"text\";\nBar();\n")).Problems;

        problems
            .Select(problem => (problem.Problem.Code, problem.Line!.Value.Line))
            .ShouldBe([("CS0103", 1), ("CS0029", 2), ("CS0103", 3)]);
    }

    [Fact]
    public void A_runtime_error_in_a_lambda_names_its_line()
    {
        var problem = bench.Fail(
            "var names = new[] { \"a.txt\" };\nvar all = names\n    .Select(name => name.Substring(99))\n    .ToList();\n"
        );

        problem.Problem.Code.ShouldBe("RR0110");
        problem.Line!.Value.Line.ShouldBe(3);
    }

    [Fact]
    public void A_refusal_by_a_step_names_the_data_and_the_recipe_line()
    {
        bench.WriteData("c.txt", "bad");
        var problem = bench.Fail("var a = Read(\"a.txt\");\n\nvar c = Read(\"c.txt\");\n");

        problem.Problem.Code.ShouldBe("XX0001");
        problem.Problem.Where.File.ShouldBe("c.txt");
        problem.Line!.Value.Line.ShouldBe(3);
        problem.Source.ShouldBe("var c = Read(\"c.txt\");");
    }

    [Fact]
    public void An_error_in_a_loaded_file_names_that_file()
    {
        bench.Write(
            "parts/common.csx",
            "Words Both(string a, string b)\n{\n    return Read(a).Join(Read(b + \"x\"));\n}\n"
        );
        var problem = bench.Fail("#load \"parts/common.csx\"\nBoth(\"a.txt\", \"b.txt\");\n");

        problem.Problem.Code.ShouldBe("RR0120");
        problem.Line!.Value.File.ShouldEndWith("parts/common.csx");
        problem.Line.Value.Line.ShouldBe(3);
        problem.Source.Trim().ShouldStartWith("return Read(a)");
    }

    [Theory]
    [InlineData("../outside.csx")]
    [InlineData("/etc/hostname")]
    [InlineData("link.csx")]
    public void Load_does_not_leave_the_recipes_folder(string path)
    {
        var outside = bench.Write("outside.csx", "var x = 1;");
        Directory.CreateDirectory(Path.Combine(bench.Folder, "inner"));
        File.CreateSymbolicLink(Path.Combine(bench.Folder, "inner", "link.csx"), outside);
        var recipe = bench.Write("inner/recipe.csx", $"#load \"{path}\"\n");

        var problem = Should
            .Throw<RecipeException>(() => Host.Running.RecipeRun.Check(recipe, Workbench.Language, default))
            .Problems[0];

        problem.Problem.Code.ShouldBe("CS1504");
        problem.Line!.Value.Line.ShouldBe(1);
    }

    [Fact]
    public void Helpers_that_are_loaded_work_and_travel_with_the_study()
    {
        bench.Write("parts/common.csx", "Words Both(string a, string b) => Read(a).Join(Read(b));\n");
        var outcome = bench.Run(
            "#load \"parts/common.csx\"\nWrite(Both(\"a.txt\", \"b.txt\"), \"tables/both.txt\");\n"
        );

        File.ReadAllText(Path.Combine(outcome.StudyFolder, "data/tables/both.txt")).ShouldBe("alpha-beta");
        File.Exists(Path.Combine(outcome.StudyFolder, "data/recipe/parts/common.csx")).ShouldBeTrue();
        outcome.Record.Journal[0].Line.File.ShouldBe("parts/common.csx");
    }

    [Theory]
    [InlineData("")]
    [InlineData("// only a remark\n")]
    public void A_recipe_that_says_nothing_is_refused(string text) =>
        Should.Throw<Model.Steps.RefusedException>(() => bench.Run(text)).Problems[0].Code.ShouldBe("RR0103");

    [Fact]
    public void A_recipe_travels_byte_for_byte_and_must_be_utf8()
    {
        byte[] marked = [.. System.Text.Encoding.UTF8.Preamble, .. "Note(\"ä\");"u8];
        File.WriteAllBytes(Path.Combine(bench.Folder, "marked.csx"), marked);
        var request = new Host.Running.RunRequest(
            Path.Combine(bench.Folder, "marked.csx"),
            null,
            bench.Study,
            System.Collections.Immutable.ImmutableSortedDictionary<string, string>.Empty,
            Replace: false
        );
        Host.Running.RecipeRun.Execute(request, Workbench.Language, new Workbench.SilentObserver(), default);
        File.ReadAllBytes(Path.Combine(bench.Study, "data/recipe/marked.csx")).ShouldBe(marked);

        File.WriteAllBytes(Path.Combine(bench.Folder, "marked.csx"), [.. "Note(\"\xE4\");"u8[..6], 0xE4, .. "\");"u8]);
        Should
            .Throw<Model.Steps.RefusedException>(() => RecipeText.Read(request.RecipePath))
            .Problems[0]
            .Code.ShouldBe("RR0104");
    }

    [Fact]
    public void A_missing_recipe_lists_those_that_are_near()
    {
        bench.Write("good.csx", "");
        var problem = Should
            .Throw<Model.Steps.RefusedException>(() => RecipeText.Read(Path.Combine(bench.Folder, "god.csx")))
            .Problems[0];

        problem.Code.ShouldBe("RR0101");
        problem.Mend.ShouldContain("good.csx");
    }
}
