using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Tests.Support;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Sealing;

/// <summary>Nothing half-written is left behind, nothing already there is lost.</summary>
public sealed class StudyFolderTests : IDisposable
{
    private const string Good = "Write(Read(\"a.txt\"), \"tables/a.txt\");";
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData("Foo();")]
    [InlineData("Read(\"a.txt\"); Read(\"none.txt\");")]
    [InlineData("Write(Read(\"a.txt\"), \"tables/a.txt\"); int.Parse(\"x\");")]
    public void A_run_that_fails_leaves_nothing(string recipe)
    {
        Should.Throw<RecipeException>(() => bench.Run(recipe));

        bench.Leftovers().ShouldBeEmpty();
    }

    [Fact]
    public async Task A_run_that_is_stopped_leaves_nothing()
    {
        using var stop = new CancellationTokenSource();
        var run = Task.Run(
            () => bench.Run("Wait(Read(\"a.txt\"));", cancellation: stop.Token),
            TestContext.Current.CancellationToken
        );
        await stop.CancelAsync();

        await Should.ThrowAsync<OperationCanceledException>(run);
        bench.Leftovers().ShouldBeEmpty();
    }

    [Fact]
    public void A_study_that_lies_there_is_kept_unless_replacing_is_asked_for()
    {
        bench.Run(Good);
        var before = File.ReadAllBytes(Path.Combine(bench.Study, "manifest-sha256.txt"));

        Should.Throw<RefusedException>(() => bench.Run(Good)).Problems[0].Code.ShouldBe("RR0702");
        Should.Throw<RecipeException>(() => bench.Run("Foo();", replace: true));
        File.ReadAllBytes(Path.Combine(bench.Study, "manifest-sha256.txt")).ShouldBe(before);

        bench.Run("Write(Read(\"b.txt\"), \"tables/b.txt\");", replace: true);
        File.Exists(Path.Combine(bench.Study, "data/tables/b.txt")).ShouldBeTrue();
        File.Exists(Path.Combine(bench.Study, "data/tables/a.txt")).ShouldBeFalse();
        bench.Leftovers().ShouldBe(["out.study"]);
    }

    [Fact]
    public void A_folder_that_is_no_study_is_never_replaced()
    {
        bench.Write("out.study/thesis.txt", "years of work");

        Should.Throw<RefusedException>(() => bench.Run(Good, replace: true)).Problems[0].Code.ShouldBe("RR0701");
        File.ReadAllText(Path.Combine(bench.Study, "thesis.txt")).ShouldBe("years of work");
    }

    [Fact]
    public void A_folder_of_the_workshops_name_that_holds_other_things_is_left_alone()
    {
        bench.Write("out.study.making/notes.txt", "mine");

        Should.Throw<RefusedException>(() => bench.Run(Good)).Problems[0].Code.ShouldBe("RR0706");
        File.ReadAllText(bench.Study + ".making/notes.txt").ShouldBe("mine");
    }

    [Fact]
    public void No_parent_folders_are_made()
    {
        Should
            .Throw<RefusedException>(() => bench.Run(Good, into: Path.Combine(bench.Folder, "a/b/out.study")))
            .Problems[0]
            .Code.ShouldBe("RR0705");
        bench.Leftovers().ShouldBeEmpty();
    }

    [Fact]
    public void What_a_killed_run_left_is_cleared_and_the_old_study_comes_back()
    {
        bench.Run(Good);
        Directory.CreateDirectory(bench.Study + ".making/study/data/tables");
        Directory.Move(bench.Study, bench.Study + ".making/old");

        Should.Throw<RefusedException>(() => bench.Run(Good)).Problems[0].Code.ShouldBe("RR0702");
        File.Exists(Path.Combine(bench.Study, "data/tables/a.txt")).ShouldBeTrue();
        bench.Leftovers().ShouldBe(["out.study"]);
    }

    [Fact]
    public void Two_runs_do_not_write_one_study_at_once()
    {
        using var first = StudyFolder.Begin(bench.Study, replace: false);

        Should
            .Throw<RefusedException>(() => StudyFolder.Begin(bench.Study, replace: false))
            .Problems[0]
            .Code.ShouldBe("RR0703");
    }

    [Theory]
    [InlineData("notes.txt")]
    [InlineData("tables/../../x")]
    [InlineData("tables/sub/x.txt")]
    [InlineData("tables/.hidden")]
    [InlineData("tables/a b.txt")]
    [InlineData("/tmp/x")]
    public void Outputs_stay_in_their_rooms_with_plain_names(string path) =>
        bench.Fail($"Write(Read(\"a.txt\"), \"{path}\");").Problem.Code.ShouldBe("RR0601");

    [Fact]
    public void A_name_is_used_once_whatever_its_case() =>
        bench
            .Fail("Write(Read(\"a.txt\"), \"tables/a.txt\"); Write(Read(\"a.txt\"), \"tables/A.txt\");")
            .Problem.Code.ShouldBe("RR0602");
}
