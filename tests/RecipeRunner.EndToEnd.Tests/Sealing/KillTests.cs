using System.Diagnostics;
using RecipeRunner.Host.Sealing;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>
/// Runs are killed outright (SIGKILL) at places and moments all over their course, while an earlier study stands where the new one is to
/// stand. At all times there is one whole study, the old or the new.
/// </summary>
public sealed class KillTests(OldStudy old) : IClassFixture<OldStudy>
{
    private const int RandomKills = 12;

    private string Making => old.Folder + ".making";

    /// <summary>Each place is a file or folder whose appearing shows how far the run has come.</summary>
    [Theory]
    [InlineData("lock")]
    [InlineData("study/data")]
    [InlineData("study/data/inputs/gauges.csv")]
    [InlineData("study/data/inputs/daily.csv")]
    [InlineData("study/data/layers/gauges-00.shp")]
    [InlineData("study/data/layers/gauges-30.dbf")]
    [InlineData("study/data/layers/gauges-59.prj")]
    [InlineData("study/data/recipe")]
    [InlineData("study/data/audit.json")]
    [InlineData("study/data/run.json")]
    [InlineData("study/manifest-sha256.txt")]
    [InlineData("study/tagmanifest-sha256.txt")]
    [InlineData("old")]
    public void A_run_killed_at_a_place_leaves_a_whole_study(string place)
    {
        KillOnce(() => Path.Exists(Path.Combine(Making, place)));
        ShouldHoldOneWholeStudy();
    }

    [Fact]
    public void A_run_killed_at_any_moment_leaves_a_whole_study()
    {
        var clock = Stopwatch.StartNew();
        old.Tool.Run(old.Run("timed", old.Folder)).ExitCode.ShouldBe(0);
        var whole = clock.Elapsed;
        var moments = new Random(20261201);
        for (var i = 0; i < RandomKills; i++)
        {
            var moment = whole * moments.NextDouble();
            var started = Stopwatch.StartNew();
            KillOnce(() => started.Elapsed >= moment);
            ShouldHoldOneWholeStudy();
        }
    }

    /// <summary>Starts a run that replaces the study, and kills it at the first moment that fits, unless it has ended before.</summary>
    private void KillOnce(Func<bool> when)
    {
        using var run = old.Tool.Begin(old.Run("new", old.Folder));
        while (!run.HasExited && !when())
        {
            Thread.Sleep(0);
        }

        run.Kill();
        run.WaitForExit();
    }

    /// <summary>
    /// The study is whole; or it was moved aside and lies whole beside, until the next run, even one that is refused, puts it back.
    /// </summary>
    private void ShouldHoldOneWholeStudy()
    {
        var aside = Path.Combine(Making, "old");
        SealCheck.Of(Directory.Exists(old.Folder) ? old.Folder : aside, CancellationToken.None).ShouldBeEmpty();
        old.Tool.Run(old.Run("again", old.Folder, replace: false)).Errors.ShouldContain("RR0702");
        SealCheck.Of(old.Folder, CancellationToken.None).ShouldBeEmpty();
        Directory.Exists(Making).ShouldBeFalse();
    }
}
