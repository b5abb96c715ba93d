using RecipeRunner.Host.Running;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>
/// The files of a study must be those that its audit names: a seal made anew after an edit fits the files, and the audit does not.
/// </summary>
internal static class AuditedFiles
{
    /// <summary>What of the files that a rerun rests on is not as the audit says: recipe files and held inputs.</summary>
    public static IReadOnlyList<Finding> OfCauses(HeldStudy held) =>
        [
            .. held
                .RecipeFiles.Concat(held.Inputs.Where(input => input.IsHeld))
                .Select(file => Problem(held, file))
                .OfType<Finding>(),
        ];

    /// <summary>What of the results is not as the audit says.</summary>
    public static IReadOnlyList<Finding> OfResults(HeldStudy held) =>
        [.. held.Results.Select(file => Problem(held, file)).OfType<Finding>()];

    private static Finding? Problem(HeldStudy held, FileRecord audited)
    {
        var path = Path.Combine(held.Payload, audited.Path);
        return !File.Exists(path) || FileDigest.Of(held.Payload, audited.Path) with { IsHeld = true } != audited
            ? Finding.Error(
                "RR0838",
                new Place("data/" + audited.Path),
                "It is not the file that the study's own audit.json names: size or digest differ.",
                "Take the study from where it came again."
            )
            : null;
    }
}
