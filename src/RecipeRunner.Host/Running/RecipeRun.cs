using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Signing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Running;

/// <summary>Runs a recipe over data and leaves a sealed study.</summary>
public static class RecipeRun
{
    /// <summary>Compiles the recipe without running it.</summary>
    /// <param name="recipePath">The recipe file.</param>
    /// <param name="language">What it may say.</param>
    /// <param name="cancellation">Stops the compiler.</param>
    /// <exception cref="RefusedException">The recipe cannot be read.</exception>
    /// <exception cref="RecipeException">It does not compile.</exception>
    public static void Check(string recipePath, RecipeLanguage language, CancellationToken cancellation) =>
        RecipeCompiler.Compile(RecipeText.Read(recipePath), language, cancellation);

    /// <summary>Runs.</summary>
    /// <param name="request">What the person asks for.</param>
    /// <param name="language">What the recipe may say.</param>
    /// <param name="observer">Told how it goes.</param>
    /// <param name="cancellation">Ends the run, leaving nothing behind.</param>
    /// <exception cref="RefusedException">The request cannot be met: the recipe, the data folder or the study folder.</exception>
    /// <exception cref="RecipeException">The recipe failed, with the line.</exception>
    /// <exception cref="OperationCanceledException">The run was cancelled.</exception>
    public static RunOutcome Execute(
        RunRequest request,
        RecipeLanguage language,
        IRunObserver observer,
        CancellationToken cancellation
    )
    {
        var clock = new RunClock();
        var recipe = RecipeText.Read(request.RecipePath);
        var signer = SealSigner.Of(request.SigningKey, cancellation);
        var data = DataFolder.At(request.DataFolder ?? recipe.Folder);
        using var folder = StudyFolder.Begin(request.StudyFolder ?? recipe.Name + ".study", request.Replace);
        var compiled = RecipeCompiler.Compile(recipe, language, cancellation);
        var inputs = new InputFiles(data, folder.Payload, request.ListInputsAbove);
        var outputs = new OutputFiles(folder.Payload);
        var settings = new RecipeSettings(request.Settings);
        var study = new RunStudy(inputs, outputs, settings, observer, cancellation);
        compiled.Run(language.CreateVerbs(study), cancellation);
        settings.ThrowWhereUnknown();
        inputs.ThrowWhereChanged(cancellation);
        var record = new StudyRecord
        {
            Title = study.GivenTitle ?? recipe.Name,
            Notes = study.Notes,
            RecipeName = recipe.FileName,
            Settings = settings.Used,
            Journal = study.Journal,
            RecipeFiles = RecipeFiles.Write(compiled, folder.Payload),
            Inputs = inputs.Records,
            Sources = study.Sources,
            ListInputsAbove = request.ListInputsAbove,
            Outputs = outputs.Records(),
        };
        StudyWriter.Write(record, folder.Payload, clock.Started, clock.Elapsed);
        var files = folder.Seal(record.Title, signer, cancellation);
        return new RunOutcome(folder.FinalPath, record, files, clock.Elapsed);
    }
}
