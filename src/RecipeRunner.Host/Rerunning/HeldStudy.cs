using System.Collections.Immutable;
using System.Text.Json;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Rerunning;

/// <summary>A step as a study's audit holds it.</summary>
/// <param name="Number">Its number.</param>
/// <param name="Title">Its title.</param>
/// <param name="Line">The recipe file and line that asked for it.</param>
/// <param name="Text">All that the audit says of it, in canonical form.</param>
/// <param name="Digest">The digest of what it gave.</param>
public sealed record HeldStep(int Number, string Title, string Line, string Text, string Digest);

/// <summary>A study that lies in a folder, as its audit describes it. Nothing is ever written into it.</summary>
public sealed class HeldStudy
{
    private HeldStudy(string folder, JsonElement audit)
    {
        Folder = folder;
        Tool = audit.GetProperty("tool").GetString()!;
        Title = audit.GetProperty("title").GetString()!;
        RecipeName = audit.GetProperty("recipe").GetString()!;
        Settings = audit
            .GetProperty("settings")
            .EnumerateArray()
            .Where(setting => !setting.GetProperty("default").GetBoolean())
            .ToImmutableSortedDictionary(
                setting => setting.GetProperty("name").GetString()!,
                setting => setting.GetProperty("value").GetString()!,
                StringComparer.Ordinal
            );
        Steps = [.. audit.GetProperty("journal").EnumerateArray().Select(StepOf)];
        Inputs =
        [
            .. audit
                .GetProperty("inputs")
                .EnumerateArray()
                .Select(input => FileOf(input) with { IsHeld = input.GetProperty("held").GetBoolean() }),
        ];
        RecipeFiles = [.. audit.GetProperty("recipe_files").EnumerateArray().Select(FileOf)];
        Results = [.. audit.GetProperty("outputs").EnumerateArray().Select(FileOf)];
        var above = audit.GetProperty("inputs_listed_above");
        ListInputsAbove = above.ValueKind == JsonValueKind.Null ? null : above.GetInt64();
        Outputs =
        [
            .. audit.GetProperty("outputs").EnumerateArray().Select(file => file.GetProperty("path").GetString()!),
        ];
    }

    /// <summary>The study's folder.</summary>
    public string Folder { get; }

    /// <summary>The tool that made it, with its version.</summary>
    public string Tool { get; }

    /// <summary>Its title.</summary>
    public string Title { get; }

    /// <summary>The recipe's file name.</summary>
    public string RecipeName { get; }

    /// <summary>The settings that were given by the person who ran it.</summary>
    public ImmutableSortedDictionary<string, string> Settings { get; }

    /// <summary>The steps that ran.</summary>
    public ImmutableArray<HeldStep> Steps { get; }

    /// <summary>The input files that were read, held or listed.</summary>
    public ImmutableArray<FileRecord> Inputs { get; }

    /// <summary>The recipe and the files that it loads.</summary>
    public ImmutableArray<FileRecord> RecipeFiles { get; }

    /// <summary>Layers and tables with what the audit says of them.</summary>
    public ImmutableArray<FileRecord> Results { get; }

    /// <summary>Inputs of more bytes than this are listed, not held; null where all are held.</summary>
    public long? ListInputsAbove { get; }

    /// <summary>Layers and tables, relative to the payload.</summary>
    public ImmutableArray<string> Outputs { get; }

    /// <summary>The payload's folder.</summary>
    public string Payload => Path.Combine(Folder, "data");

    /// <summary>Opens a study.</summary>
    /// <param name="folder">Its folder.</param>
    /// <exception cref="RefusedException">There is none, or its audit cannot be read.</exception>
    public static HeldStudy Open(string folder)
    {
        var path = Path.Combine(folder, "data", "audit.json");
        if (!File.Exists(path))
        {
            throw Refusal(
                folder,
                "RR0801",
                "This is not a study: it has no data/audit.json.",
                "Name a study's folder."
            );
        }

        try
        {
            using var audit = JsonDocument.Parse(File.ReadAllBytes(path));
            var form = audit.RootElement.GetProperty("form").GetInt32();
            return form == AuditDocument.Form
                ? new HeldStudy(folder, audit.RootElement)
                : throw Refusal(
                    path,
                    "RR0809",
                    FormattableString.Invariant(
                        $"Its audit has form {form}; this version reads form {AuditDocument.Form}."
                    ),
                    "Use the version of the tool that made it, or a later one that reads it."
                );
        }
        catch (Exception damage)
            when (damage is JsonException or KeyNotFoundException or InvalidOperationException or FormatException)
        {
            throw Refusal(
                path,
                "RR0808",
                $"Its audit cannot be read: {damage.Message}",
                "Take the study from where it came again."
            );
        }
    }

    private static FileRecord FileOf(JsonElement file) =>
        new(
            file.GetProperty("path").GetString()!,
            file.GetProperty("bytes").GetInt64(),
            file.GetProperty("sha256").GetString()!
        );

    private static HeldStep StepOf(JsonElement step) =>
        new(
            step.GetProperty("step").GetInt32(),
            step.GetProperty("title").GetString()!,
            FormattableString.Invariant(
                $"{step.GetProperty("recipe_file").GetString()} line {step.GetProperty("recipe_line").GetInt32()}"
            ),
            JsonSerializer.Serialize(step),
            step.GetProperty("output").GetProperty("sha256").GetString()!
        );

    private static RefusedException Refusal(string place, string code, string what, string mend) =>
        new(Finding.Error(code, new Place(place), what, mend));
}
