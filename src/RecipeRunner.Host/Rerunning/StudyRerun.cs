using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>
/// Reruns a study from itself: checks its seal, runs the enclosed recipe on the enclosed inputs in a place of its own, and compares
/// what comes out. Nothing is written into the study.
/// </summary>
public static class StudyRerun
{
    /// <summary>Reruns.</summary>
    /// <param name="folder">The study's folder.</param>
    /// <param name="language">What its recipe may say.</param>
    /// <param name="reader">Reads emitted files, where bytes differ.</param>
    /// <param name="observer">Told how it goes.</param>
    /// <param name="cancellation">Ends the rerun.</param>
    /// <exception cref="OperationCanceledException">The rerun was cancelled.</exception>
    public static RerunReport Of(
        string folder,
        RecipeLanguage language,
        IOutputReader reader,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        if (!Directory.Exists(folder))
        {
            return Unable(
                Finding.Error("RR0801", new Place(folder), "There is no such folder.", "Name a study's folder.")
            );
        }

        var broken = SealCheck.Of(folder, cancellation);
        if (broken.Count > 0)
        {
            return Unable([.. broken]);
        }

        var scratch = Directory.CreateTempSubdirectory("recipe-runner-rerun-");
        try
        {
            return Rerun(
                HeldStudy.Open(folder),
                Path.Combine(scratch.FullName, "again.study"),
                language,
                reader,
                observer,
                cancellation
            );
        }
        catch (RefusedException refused)
        {
            return Unable([.. refused.Problems]);
        }
        finally
        {
            scratch.Delete(recursive: true);
        }
    }

    private static RerunReport Rerun(
        HeldStudy held,
        string again,
        RecipeLanguage language,
        IOutputReader reader,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        var inputs = Path.Combine(held.Payload, "inputs");
        var recipe = Path.Combine(held.Payload, "recipe", held.RecipeName);
        var request = new RunRequest(
            recipe,
            Directory.Exists(inputs) ? inputs : null,
            again,
            held.Settings,
            Replace: false
        );
        try
        {
            RecipeRun.Execute(request, language, observer, cancellation);
        }
        catch (RecipeException failed)
        {
            return Unable([.. failed.Problems.Select(problem => problem.Problem)]) with
            {
                Title = held.Title,
                MadeWith = held.Tool,
            };
        }

        return StudyComparison.Of(held, HeldStudy.Open(again), reader);
    }

    private static RerunReport Unable(params ImmutableArray<Finding> problems) =>
        new() { Verdict = Verdict.CannotRerun, Problems = problems };
}
