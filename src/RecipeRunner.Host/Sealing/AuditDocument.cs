using System.Text.Json.Nodes;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Summarising;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Sealing;

/// <summary>The audit for machines: what was asked, what was read, every step, every finding, what was written.</summary>
internal static class AuditDocument
{
    /// <summary>The version of the audit's form. It changes when a reader of the old form would misread the new one.</summary>
    public const int Form = 2;

    /// <summary>The facts by which steps state a datum operation with its accuracy.</summary>
    private static readonly string[] DatumFacts = ["datum", "positions"];

    public static JsonObject Of(StudyRecord record) =>
        new()
        {
            ["form"] = Form,
            ["tool"] = $"Recipe Runner {ToolVersion.Text}",
            ["title"] = record.Title,
            ["notes"] = Array(record.Notes.Select(note => JsonValue.Create(note))),
            ["caution"] = Caution.Text,
            ["assumptions"] = Array(record.Assumptions.Select(text => JsonValue.Create(text))),
            ["recipe"] = record.RecipeName,
            ["settings"] = Array(record.Settings.Select(Setting)),
            ["recipe_files"] = Array(record.RecipeFiles.Select(FileEntry)),
            ["inputs"] = Array(record.Inputs.Select(InputFile)),
            ["inputs_listed_above"] = record.ListInputsAbove,
            ["sources"] = Array(record.Sources.Select(SourceEntry)),
            ["reference_systems"] = Array(ReferenceSystems(record).Select(ReferenceSystemEntry)),
            ["datum_operations"] = Array(record.Journal.SelectMany(DatumOperations)),
            ["journal"] = Array(record.Journal.Select(Entry)),
            ["findings"] = Array(
                record.Journal.SelectMany(entry => entry.Findings.Select(finding => FindingOf(entry, finding)))
            ),
            ["outputs"] = Array(record.Outputs.Select(FileEntry)),
        };

    private static JsonObject Setting(SettingUsed setting) =>
        new()
        {
            ["name"] = setting.Name,
            ["value"] = setting.Value,
            ["default"] = setting.IsDefault,
        };

    private static JsonObject FileEntry(FileRecord file) =>
        new()
        {
            ["path"] = file.Path,
            ["bytes"] = file.Bytes,
            ["sha256"] = file.Sha256,
        };

    private static JsonObject InputFile(FileRecord file)
    {
        var node = FileEntry(file);
        node["held"] = file.IsHeld;
        return node;
    }

    private static JsonObject SourceEntry(DataSource source) =>
        new()
        {
            ["file"] = source.File,
            ["text"] = source.Text,
            ["licence"] = source.Licence,
            ["inputs"] = Array(source.Inputs.Select(input => JsonValue.Create(input))),
        };

    /// <summary>The systems in which the study's basins and gauges lay, in the order in which they first came up.</summary>
    private static IEnumerable<ReferenceSystem> ReferenceSystems(StudyRecord record) =>
        record
            .Journal.Select(entry => entry.Output)
            .Select(output =>
                output switch
                {
                    BasinLayer basins => basins.ReferenceSystem,
                    GaugeNetwork gauges => gauges.ReferenceSystem,
                    _ => null,
                }
            )
            .OfType<ReferenceSystem>()
            .DistinctBy(system => system.Label, StringComparer.Ordinal);

    private static JsonObject ReferenceSystemEntry(ReferenceSystem system) =>
        new()
        {
            ["code"] = system.Code,
            ["name"] = system.Name,
            ["datum"] = system.Datum,
            ["unit"] = system.UnitName,
        };

    private static IEnumerable<JsonNode> DatumOperations(JournalEntry entry) =>
        entry
            .Statements.Where(statement => DatumFacts.Contains(statement.Name, StringComparer.Ordinal))
            .Select(statement => new JsonObject { ["step"] = entry.Number, ["operation"] = statement.Value });

    private static JsonObject Entry(JournalEntry entry) =>
        new()
        {
            ["step"] = entry.Number,
            ["title"] = entry.Title,
            ["type"] = entry.StepType,
            ["library"] = entry.Library,
            ["source"] = entry.Source,
            ["recipe_file"] = entry.Line.File,
            ["recipe_line"] = entry.Line.Line,
            ["settings"] = Pairs(entry.Settings),
            ["inputs"] = Array(entry.Inputs.Select(InputEntry)),
            ["output"] = new JsonObject { ["what"] = entry.Output.Describe(), ["sha256"] = entry.Output.Digest },
            ["facts"] = Pairs(entry.Statements),
            ["files_read"] = Array(entry.FilesRead.Select(file => JsonValue.Create(file))),
            ["files_written"] = Array(entry.FilesWritten.Select(file => JsonValue.Create(file))),
            ["findings"] = Array(entry.Findings.Select(FindingEntry)),
        };

    private static JsonObject InputEntry(StepInput input) =>
        new()
        {
            ["name"] = input.Name,
            ["step"] = input.Entry,
            ["sha256"] = input.Digest,
        };

    private static JsonObject FindingOf(JournalEntry entry, Finding finding)
    {
        var node = FindingEntry(finding);
        node.Insert(0, "step", entry.Number);
        return node;
    }

    private static JsonObject FindingEntry(Finding finding) =>
        new()
        {
            ["severity"] = SeverityWord.Of(finding.Severity),
            ["code"] = finding.Code,
            ["file"] = finding.Where.File,
            ["line"] = Known(finding.Where.Line),
            ["column"] = Known(finding.Where.Column),
            ["item"] = finding.Where.Item,
            ["what"] = finding.What,
            ["mend"] = finding.Mend,
        };

    private static JsonNode? Known(int place) => place > 0 ? JsonValue.Create(place) : null;

    private static JsonArray Pairs(IEnumerable<(string Name, string Value)> pairs) =>
        Array(pairs.Select(pair => new JsonObject { ["name"] = pair.Name, ["value"] = pair.Value }));

    private static JsonArray Array(IEnumerable<JsonNode?> nodes) => new([.. nodes]);
}
