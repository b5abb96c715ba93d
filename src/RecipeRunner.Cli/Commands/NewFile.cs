using RecipeRunner.Model.Steps;

namespace RecipeRunner.Cli.Commands;

/// <summary>Writes files that a person asks for beside what is printed; nothing that is there is lost.</summary>
internal static class NewFile
{
    /// <summary>Refuses where something has one of these names.</summary>
    /// <param name="paths">The files; null for none.</param>
    /// <exception cref="RefusedException">Something is there.</exception>
    public static void Require(params string?[] paths)
    {
        var problems = new Problems();
        foreach (var path in paths.OfType<string>().Where(Path.Exists))
        {
            problems.Add(
                "RR0840",
                new Place(path),
                "Something of this name is there. It is left as it is.",
                "Give another name."
            );
        }

        problems.ThrowIfAny();
    }

    /// <summary>Writes a file.</summary>
    /// <param name="path">The file; null for none.</param>
    /// <param name="text">Makes its text.</param>
    public static void Write(string? path, Func<string> text)
    {
        if (path is not null)
        {
            using var stream = new FileStream(path, FileMode.CreateNew, FileAccess.Write);
            stream.Write(System.Text.Encoding.UTF8.GetBytes(text()));
        }
    }
}
