using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>
/// Reruns a study from itself: checks its seal, runs the enclosed recipe on the enclosed inputs in a place of its own, and compares
/// what comes out. Nothing is written into the study.
/// </summary>
public static class StudyRerun
{
    /// <summary>Reruns.</summary>
    /// <param name="request">The study, and where to find what it does not hold.</param>
    /// <param name="language">What its recipe may say.</param>
    /// <param name="reader">Reads emitted files, where bytes differ.</param>
    /// <param name="observer">Told how it goes.</param>
    /// <param name="cancellation">Ends the rerun.</param>
    /// <exception cref="OperationCanceledException">The rerun was cancelled.</exception>
    public static RerunReport Of(
        RerunRequest request,
        RecipeLanguage language,
        IOutputReader reader,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        try
        {
            using var replay = StudyReplay.Of(request, language, observer, cancellation);
            var report = StudyComparison.Of(replay.Held, HeldStudy.Open(replay.MadeFolder), reader);
            return Weighed(report, AuditedFiles.OfResults(replay.Held)) with { Signer = replay.Signer };
        }
        catch (RefusedException refused)
        {
            return Unable([.. refused.Problems]);
        }
        catch (RecipeException failed)
        {
            return Unable([.. failed.Problems.Select(problem => problem.Problem)]);
        }
    }

    /// <summary>Results that are not those of the audit are not this study's, however near their numbers.</summary>
    private static RerunReport Weighed(RerunReport report, IReadOnlyList<Finding> odd) =>
        report.Verdict == Verdict.SameValues && odd.Count > 0
            ? report with
            {
                Verdict = Verdict.Differs,
                Problems = [.. odd],
            }
            : report;

    private static RerunReport Unable(params ImmutableArray<Finding> problems) =>
        new() { Verdict = Verdict.CannotRerun, Problems = problems };
}
