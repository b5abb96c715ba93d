using RecipeRunner.Host.Running;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>
/// Where a rerun finds its data: within the study, or, where the study lists inputs without holding them, in a folder that must have
/// every input as it was.
/// </summary>
internal static class RerunInputs
{
    /// <summary>The folder; null where the study read nothing.</summary>
    /// <exception cref="RefusedException">The study does not hold all inputs and no folder has them as they were.</exception>
    public static string? FolderOf(HeldStudy held, string? given)
    {
        if (given is not null)
        {
            var problems = held.Inputs.Select(input => Problem(input, given)).OfType<Finding>().ToArray();
            return problems.Length == 0 ? given : throw new RefusedException([.. problems]);
        }

        var listed = held.Inputs.Where(input => !input.IsHeld).Select(input => input.Name).ToArray();
        if (listed.Length > 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0835",
                    new Place(held.Folder),
                    $"The study names inputs that it does not hold: {string.Join(", ", listed)}.",
                    "Name the folder that has all of its inputs with --data."
                )
            );
        }

        return held.Inputs.IsEmpty ? null : Path.Combine(held.Payload, "inputs");
    }

    private static Finding? Problem(FileRecord input, string folder)
    {
        if (!File.Exists(Path.Combine(folder, input.Name)))
        {
            return Finding.Error("RR0836", new Place(input.Name), $"The study read it; {folder} does not have it.");
        }

        var found = FileDigest.Of(folder, input.Name);
        return found.Bytes == input.Bytes && string.Equals(found.Sha256, input.Sha256, StringComparison.Ordinal)
            ? null
            : Finding.Error(
                "RR0837",
                new Place(input.Name),
                $"It is not the file that the study read: {input.Sha256} was, {found.Sha256} is.",
                "Name the folder that has the data of that day; to see what revised data change, run the recipe on them."
            );
    }
}
