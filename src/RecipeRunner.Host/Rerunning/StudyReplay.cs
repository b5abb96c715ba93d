using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Signing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>A sealed study whose recipe was run again on its own inputs, in a place of its own that goes when this is disposed of.</summary>
public sealed class StudyReplay : IDisposable
{
    private readonly DirectoryInfo scratch;

    private StudyReplay(HeldStudy held, Signer? signer, string? inputs, RunOutcome outcome, DirectoryInfo scratch)
    {
        Held = held;
        Signer = signer;
        InputFolder = inputs;
        Record = outcome.Record;
        MadeFolder = outcome.StudyFolder;
        this.scratch = scratch;
    }

    /// <summary>The study as it lies in its folder.</summary>
    public HeldStudy Held { get; }

    /// <summary>Who signed it; null where nobody did.</summary>
    public Signer? Signer { get; }

    /// <summary>The folder that has its inputs; null where it read nothing.</summary>
    public string? InputFolder { get; }

    /// <summary>What the run did, with all artifacts.</summary>
    public StudyRecord Record { get; }

    /// <summary>The study that it left.</summary>
    public string MadeFolder { get; }

    /// <summary>Checks seal and signature, and runs the enclosed recipe on the enclosed inputs. Nothing is written into the study.</summary>
    /// <param name="request">The study, and where to find what it does not hold.</param>
    /// <param name="language">What its recipe may say.</param>
    /// <param name="observer">Told how it goes.</param>
    /// <param name="cancellation">Ends the run.</param>
    /// <exception cref="RefusedException">There is no study, its seal or signature is broken, or inputs are not to be had.</exception>
    /// <exception cref="RecipeException">Its recipe failed.</exception>
    /// <exception cref="OperationCanceledException">The run was cancelled.</exception>
    public static StudyReplay Of(
        RerunRequest request,
        RecipeLanguage language,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        RequireWhole(request.Folder, cancellation);
        var signer = SealSignature.Check(request.Folder, request.Signers, cancellation);
        var held = HeldStudy.Open(request.Folder);
        ThrowIfAny([.. SealCheck.OfInfo(request.Folder, held.Title, held.Tool), .. AuditedFiles.OfCauses(held)]);
        var inputs = RerunInputs.FolderOf(held, request.DataFolder);
        var place = Directory.CreateTempSubdirectory("recipe-runner-rerun-");
        try
        {
            var run = new RunRequest(
                Path.Combine(held.Payload, "recipe", held.RecipeName),
                inputs,
                Path.Combine(place.FullName, "again.study"),
                held.Settings,
                Replace: false,
                held.ListInputsAbove
            );
            return new StudyReplay(
                held,
                signer,
                inputs,
                RecipeRun.Execute(run, language, observer, cancellation),
                place
            );
        }
        catch
        {
            place.Delete(recursive: true);
            throw;
        }
    }

    /// <inheritdoc/>
    public void Dispose() => scratch.Delete(recursive: true);

    private static void RequireWhole(string folder, CancellationToken cancellation)
    {
        if (!Directory.Exists(folder))
        {
            throw new RefusedException(
                Finding.Error("RR0801", new Place(folder), "There is no such folder.", "Name a study's folder.")
            );
        }

        ThrowIfAny(SealCheck.Of(folder, cancellation));
    }

    private static void ThrowIfAny(IReadOnlyList<Finding> problems)
    {
        if (problems.Count > 0)
        {
            throw new RefusedException([.. problems]);
        }
    }
}
