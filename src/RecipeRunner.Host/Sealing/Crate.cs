using System.Text.Json.Nodes;
using RecipeRunner.Host.Running;

namespace RecipeRunner.Host.Sealing;

/// <summary>
/// The payload as an RO-Crate 1.1 (https://w3id.org/ro/crate/1.1): the root, its files, and the recipe as the script that
/// made them. No date of publication: a study's bytes do not depend on the clock.
/// </summary>
internal static class Crate
{
    public static JsonObject Of(StudyRecord record)
    {
        var files = Files(record).OrderBy(file => file.Path, StringComparer.Ordinal).ToArray();
        return new JsonObject
        {
            ["@context"] = "https://w3id.org/ro/crate/1.1/context",
            ["@graph"] = new JsonArray([Descriptor(), Root(record, files), .. files.Select(Entity)]),
        };
    }

    private static IEnumerable<(string Path, long? Bytes, string? Sha256, string Type)> Files(StudyRecord record)
    {
        var listed = record
            .RecipeFiles.Select(file => (file, type: "SoftwareSourceCode"))
            .Concat(record.Inputs.Concat(record.Outputs).Select(file => (file, type: "")))
            .Select(pair => (pair.file.Path, (long?)pair.file.Bytes, (string?)pair.file.Sha256, pair.type));
        return listed.Concat([
            ("audit.json", null, null, ""),
            ("run.json", null, null, ""),
            ("summary.html", null, null, ""),
        ]);
    }

    private static JsonObject Descriptor() =>
        new()
        {
            ["@id"] = "ro-crate-metadata.json",
            ["@type"] = "CreativeWork",
            ["conformsTo"] = new JsonObject { ["@id"] = "https://w3id.org/ro/crate/1.1" },
            ["about"] = new JsonObject { ["@id"] = "./" },
        };

    private static JsonObject Root(
        StudyRecord record,
        IEnumerable<(string Path, long? Bytes, string? Sha256, string Type)> files
    ) =>
        new()
        {
            ["@id"] = "./",
            ["@type"] = "Dataset",
            ["name"] = record.Title,
            ["description"] =
                $"Mean areal precipitation made by the recipe {record.RecipeName} with Recipe Runner {ToolVersion.Text}.",
            ["hasPart"] = new JsonArray([.. files.Select(file => new JsonObject { ["@id"] = Id(file.Path) })]),
        };

    private static JsonObject Entity((string Path, long? Bytes, string? Sha256, string Type) file)
    {
        var entity = new JsonObject
        {
            ["@id"] = Id(file.Path),
            ["@type"] = file.Type.Length > 0 ? new JsonArray("File", file.Type) : "File",
            ["name"] = file.Path,
        };
        if (file.Bytes is { } bytes)
        {
            entity["contentSize"] = FormattableString.Invariant($"{bytes}");
            entity["sha256"] = file.Sha256;
        }

        return entity;
    }

    private static string Id(string path) => string.Join('/', path.Split('/').Select(Uri.EscapeDataString));
}
