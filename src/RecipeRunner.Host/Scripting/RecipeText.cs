using System.Collections.Immutable;
using System.Text;
using System.Text.Unicode;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Scripting;

/// <summary>A recipe as it was read: its text, where it lies, and how people see its name.</summary>
/// <param name="FilePath">The full path of the recipe file.</param>
/// <param name="ShownFolder">The folder as the person wrote it, with a trailing slash; empty for the current folder.</param>
/// <param name="Bytes">The file, byte for byte.</param>
/// <param name="Text">Its text.</param>
public sealed record RecipeText(string FilePath, string ShownFolder, ImmutableArray<byte> Bytes, string Text)
{
    /// <summary>The largest recipe that is read, in bytes.</summary>
    public const int LargestBytes = 1 << 20;

    /// <summary>The file's name.</summary>
    public string FileName => Path.GetFileName(FilePath);

    /// <summary>The folder in which the recipe and all that it loads lie.</summary>
    public string Folder => Path.GetDirectoryName(FilePath)!;

    /// <summary>The file's name without its ending: the study's name unless another is asked for.</summary>
    public string Name => Path.GetFileNameWithoutExtension(FilePath);

    /// <summary>Reads a recipe.</summary>
    /// <param name="path">The path as the person wrote it.</param>
    /// <exception cref="RefusedException">There is no such file, or it is too large.</exception>
    public static RecipeText Read(string path)
    {
        var file = new FileInfo(path);
        if (!file.Exists)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0101",
                    new Place(path),
                    Directory.Exists(path) ? "This is a folder, not a recipe." : "There is no such recipe.",
                    NearRecipes(path)
                )
            );
        }

        if (file.Length > LargestBytes)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0102",
                    new Place(path),
                    FormattableString.Invariant(
                        $"A recipe is at most {LargestBytes} bytes long; this file has {file.Length}."
                    ),
                    "Is this the recipe, or one of its data files?"
                )
            );
        }

        var shown = Path.GetDirectoryName(path) is { Length: > 0 } folder ? folder + "/" : "";
        var bytes = File.ReadAllBytes(path);
        return new RecipeText(file.FullName, shown, [.. bytes], Decode(bytes, path));
    }

    /// <summary>The text of a recipe's bytes: UTF-8, with or without a byte-order mark.</summary>
    /// <exception cref="RefusedException">They are not UTF-8.</exception>
    internal static string Decode(ReadOnlySpan<byte> bytes, string shown)
    {
        var text = bytes.StartsWith(Encoding.UTF8.Preamble) ? bytes[Encoding.UTF8.Preamble.Length..] : bytes;
        if (Utf8.IsValid(text))
        {
            return Encoding.UTF8.GetString(text);
        }

        throw new RefusedException(
            Finding.Error(
                "RR0104",
                new Place(shown),
                "The recipe is not UTF-8 text.",
                "Save it as UTF-8 in your editor."
            )
        );
    }

    private static string NearRecipes(string path)
    {
        var folder =
            Directory.Exists(path) ? path
            : Path.GetDirectoryName(path) is { Length: > 0 } parent ? parent
            : ".";
        var recipes = Directory.Exists(folder)
            ? Directory
                .GetFiles(folder, "*.csx")
                .Select(Path.GetFileName)
                .Order(StringComparer.Ordinal)
                .Take(10)
                .ToArray()
            : [];
        return recipes.Length > 0
            ? $"Recipes in {folder}: {string.Join(", ", recipes)}."
            : "Recipes are files that end in .csx; name one of them.";
    }
}
