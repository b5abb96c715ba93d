using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Running;

/// <summary>The journal says what ran from the steps themselves.</summary>
public sealed class JournalTests : IDisposable
{
    private const string Recipe =
        "Title(\"Two words\");\nvar a = Read(\"a.txt\");\nvar b = Read(\"b.txt\");\nvar c = a.Join(b, with: \"+\", strength: 0.5);\nWrite(c, \"tables/c.txt\");\n";
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Steps_stand_in_order_with_line_settings_inputs_and_files()
    {
        var journal = bench.Run(Recipe).Record.Journal;

        journal
            .Select(entry => (entry.Number, entry.Title, entry.Line.Line))
            .ShouldBe([(1, "Read words", 2), (2, "Read words", 3), (3, "Join words", 4), (4, "Write words", 5)]);
        journal[0].FilesRead.ShouldBe(["a.txt"]);
        journal[2].Settings.ShouldBe([("With", "+"), ("Strength", "0.5")]);
        journal[2].Inputs.Select(input => (input.Name, input.Entry)).ShouldBe([("First", 1), ("Second", 2)]);
        journal[2].Inputs[0].Digest.ShouldBe(journal[0].Output.Digest);
        journal[2].Statements.ShouldBe([("joint", "+")]);
        journal[2].Source.ShouldBe("Nobody 1900");
        journal[3].FilesWritten.ShouldBe(["tables/c.txt"]);
    }

    [Fact]
    public void The_record_holds_title_findings_assumptions_and_digests_of_files()
    {
        var record = bench.Run(Recipe).Record;

        record.Title.ShouldBe("Two words");
        record.Findings.Select(finding => finding.Code).ShouldBe(["XX0002"]);
        record.Assumptions.ShouldBe(["Words mean what they say."]);

        // source: SHA-256 of the five bytes "alpha", by sha256sum of GNU coreutils 9.1.
        record
            .Inputs[0]
            .ShouldBe(
                new Host.Running.FileRecord(
                    "inputs/a.txt",
                    5,
                    "8ed3f6ad685b959ead7022518e1af76cd816f8e8ec7ccdda1ed4018e8f2223f8"
                )
            );
    }

    [Fact]
    public void What_several_steps_find_alike_is_said_once()
    {
        var record = bench.Run(Recipe + "a.Join(b, with: \"-\", strength: 1);\n").Record;

        record.Findings.Select(finding => finding.Code).ShouldBe(["XX0002"]);
        record.Journal.Sum(entry => entry.Findings.Length).ShouldBe(2);
    }

    [Fact]
    public void Steps_run_one_after_the_other()
    {
        const string Together =
            "var a = Read(\"a.txt\");\nvar other = System.Threading.Tasks.Task.Run(() => Wait(a));\nwhile (!other.IsFaulted) { Read(\"b.txt\"); System.Threading.Thread.Sleep(5); }\nother.Wait();\n";
        var problem = bench.Fail(Together);

        problem.Problem.Code.ShouldBe("RR0113");
    }

    [Fact]
    public void An_artifact_of_another_study_is_refused()
    {
        bench.Run("WordVerbs.Kept = Read(\"a.txt\");");

        var problem = Should
            .Throw<RecipeException>(() =>
                bench.Run("Read(\"b.txt\").Join(WordVerbs.Kept);", into: Path.Combine(bench.Folder, "two.study"))
            )
            .Problems[0];

        problem.Problem.Code.ShouldBe("RR0112");
    }
}
