using System.Collections.Immutable;
using System.Text;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;

namespace RecipeRunner.Host.Sealing;

/// <summary>Puts the recipe and all that it loads into a study, so that the study can be rerun from itself.</summary>
internal static class RecipeFiles
{
    public static ImmutableArray<FileRecord> Write(CompiledRecipe compiled, string payload)
    {
        var texts = compiled.Loaded.Add((compiled.Recipe.FileName, compiled.Recipe.Text));
        foreach (var (name, text) in texts)
        {
            var path = Path.Combine(payload, "recipe", name);
            Directory.CreateDirectory(Path.GetDirectoryName(path)!);
            File.WriteAllText(path, text, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false));
        }

        return
        [
            .. texts
                .Select(text => "recipe/" + text.Name)
                .Order(StringComparer.Ordinal)
                .Select(path => FileDigest.Of(payload, path)),
        ];
    }
}
