using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;

namespace RecipeRunner.Host.Sealing;

/// <summary>Puts the recipe and all that it loads into a study, so that the study can be rerun from itself.</summary>
internal static class RecipeFiles
{
    public static ImmutableArray<FileRecord> Write(CompiledRecipe compiled, string payload)
    {
        var files = compiled.Loaded.Add(
            new LoadedText(compiled.Recipe.FileName, compiled.Recipe.Bytes, compiled.Recipe.Text)
        );
        foreach (var file in files)
        {
            var path = Path.Combine(payload, "recipe", file.Name);
            Directory.CreateDirectory(Path.GetDirectoryName(path)!);
            File.WriteAllBytes(path, file.Bytes.AsSpan());
        }

        return
        [
            .. files
                .Select(file => "recipe/" + file.Name)
                .Order(StringComparer.Ordinal)
                .Select(path => FileDigest.Of(payload, path)),
        ];
    }
}
