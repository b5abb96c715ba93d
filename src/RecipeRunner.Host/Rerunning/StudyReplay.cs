using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>A sealed study whose recipe was run again on its own inputs, in a place of its own that goes when this is disposed of.</summary>
public sealed class StudyReplay : IDisposable
{
    private readonly DirectoryInfo scratch;

    private StudyReplay(HeldStudy held, StudyRecord record, string madeFolder, DirectoryInfo scratch)
    {
        Held = held;
        Record = record;
        MadeFolder = madeFolder;
        this.scratch = scratch;
    }

    /// <summary>The study as it lies in its folder.</summary>
    public HeldStudy Held { get; }

    /// <summary>What the run did, with all artifacts.</summary>
    public StudyRecord Record { get; }

    /// <summary>The study that it left.</summary>
    public string MadeFolder { get; }

    /// <summary>Checks the seal and runs the enclosed recipe on the enclosed inputs. Nothing is written into the study.</summary>
    /// <param name="folder">The study's folder.</param>
    /// <param name="language">What its recipe may say.</param>
    /// <param name="observer">Told how it goes.</param>
    /// <param name="cancellation">Ends the run.</param>
    /// <exception cref="RefusedException">There is no study, or its seal is broken.</exception>
    /// <exception cref="RecipeException">Its recipe failed.</exception>
    /// <exception cref="OperationCanceledException">The run was cancelled.</exception>
    public static StudyReplay Of(
        string folder,
        RecipeLanguage language,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        if (!Directory.Exists(folder))
        {
            throw new RefusedException(
                Finding.Error("RR0801", new Place(folder), "There is no such folder.", "Name a study's folder.")
            );
        }

        var broken = SealCheck.Of(folder, cancellation);
        if (broken.Count > 0)
        {
            throw new RefusedException([.. broken]);
        }

        var held = HeldStudy.Open(folder);
        var place = Directory.CreateTempSubdirectory("recipe-runner-rerun-");
        try
        {
            var made = Path.Combine(place.FullName, "again.study");
            var outcome = RecipeRun.Execute(RequestOf(held, made), language, observer, cancellation);
            return new StudyReplay(held, outcome.Record, made, place);
        }
        catch
        {
            place.Delete(recursive: true);
            throw;
        }
    }

    /// <inheritdoc/>
    public void Dispose() => scratch.Delete(recursive: true);

    private static RunRequest RequestOf(HeldStudy held, string made)
    {
        var inputs = Path.Combine(held.Payload, "inputs");
        return new RunRequest(
            Path.Combine(held.Payload, "recipe", held.RecipeName),
            Directory.Exists(inputs) ? inputs : null,
            made,
            held.Settings,
            Replace: false
        );
    }
}
