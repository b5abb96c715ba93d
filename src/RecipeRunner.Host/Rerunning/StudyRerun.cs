using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Signing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>
/// Reruns a study from itself: checks its seal, runs the enclosed recipe on the enclosed inputs in a place of its own, and compares
/// what comes out. Nothing is written into the study.
/// </summary>
public static class StudyRerun
{
    /// <summary>Reruns.</summary>
    /// <param name="request">The study, and what is asked beside.</param>
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
        var folder = request.Folder;
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
            var signer = SealSignature.Check(folder, request.Signers, cancellation);
            var held = HeldStudy.Open(folder);
            Finding[] odd = [.. SealCheck.OfInfo(folder, held.Title, held.Tool), .. AuditedFiles.OfCauses(held)];
            if (odd.Length > 0)
            {
                return Unable([.. odd]);
            }

            var report = Rerun(
                held,
                RerunInputs.FolderOf(held, request.DataFolder),
                Path.Combine(scratch.FullName, "again.study"),
                language,
                reader,
                observer,
                cancellation
            );
            return Weighed(report, AuditedFiles.OfResults(held)) with { Signer = signer };
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
        string? inputs,
        string again,
        RecipeLanguage language,
        IOutputReader reader,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        var recipe = Path.Combine(held.Payload, "recipe", held.RecipeName);
        var request = new RunRequest(recipe, inputs, again, held.Settings, Replace: false, held.ListInputsAbove);
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
