using System.Text.Json.Nodes;
using RecipeRunner.Host.Running;
using static RecipeRunner.Host.Sealing.Crates.CrateEntity;

namespace RecipeRunner.Host.Sealing.Crates;

/// <summary>
/// The steps of a run, after the Provenance Run Crate profile 0.5: each is planned by a HowToStep, controlled by a ControlAction, and
/// carried out by a CreateAction of the tool, on files, settings and the results of earlier steps.
/// </summary>
internal static class CrateSteps
{
    /// <summary>The ids of the tools that the steps use, each once.</summary>
    public static IEnumerable<string> Tools(StudyRecord record) => Kinds(record).Select(kind => ToolId(kind.Key));

    /// <summary>The ids of the planned steps.</summary>
    public static IEnumerable<string> Plans(StudyRecord record) => record.Journal.Select(entry => Id("step", entry));

    /// <summary>The ids of the actions that control the steps.</summary>
    public static IEnumerable<string> Controls(StudyRecord record) =>
        record.Journal.Select(entry => Id("control", entry));

    /// <summary>The ids of the actions that carried the steps out.</summary>
    public static IEnumerable<string> Actions(StudyRecord record) =>
        record.Journal.Select(entry => Id("action", entry));

    /// <summary>All entities that tell of steps.</summary>
    public static IEnumerable<JsonObject> Entities(StudyRecord record) =>
        Kinds(record).SelectMany(Tool).Concat(record.Journal.SelectMany(entry => Step(entry, record)));

    private static IEnumerable<IGrouping<string, JournalEntry>> Kinds(StudyRecord record) =>
        record.Journal.GroupBy(entry => entry.StepType, StringComparer.Ordinal);

    private static string ToolId(string stepType) => LocalId("tool", stepType);

    private static string Id(string kind, JournalEntry entry) => Id(kind, entry.Number);

    private static string Id(string kind, int number) => FormattableString.Invariant($"#{kind}/{number}");

    private static string ParameterId(string stepType, string name) => LocalId("tool", stepType, name);

    private static IEnumerable<JsonObject> Tool(IGrouping<string, JournalEntry> kind)
    {
        var first = kind.First();
        var inputs = kind.SelectMany(entry => entry.Inputs.Select(input => input.Name))
            .Distinct(StringComparer.Ordinal)
            .ToArray();
        var settings = kind.SelectMany(entry => entry.Settings.Select(setting => setting.Name))
            .Distinct(StringComparer.Ordinal)
            .Except(inputs, StringComparer.Ordinal);
        JsonObject[] parameters =
        [
            .. inputs.Select(name => Parameter(ParameterId(kind.Key, name), name, "CreativeWork")),
            .. settings.Select(name => Parameter(ParameterId(kind.Key, name), name, "Text")),
        ];
        var tool = Entity(ToolId(kind.Key), first.Title, "SoftwareApplication");
        tool["alternateName"] = kind.Key;
        tool["description"] =
            first.Source.Length > 0
                ? $"A step of the library {first.Library}. Method: {first.Source}"
                : $"A step of the library {first.Library}.";
        tool["softwareVersion"] = first.Library[(first.Library.LastIndexOf(' ') + 1)..];
        tool["input"] = ToAll(parameters.Select(parameter => parameter["@id"]!.GetValue<string>()));
        return parameters.Prepend(tool);
    }

    /// <summary>A parameter of a tool or of the recipe.</summary>
    public static JsonObject Parameter(string id, string name, string type)
    {
        var parameter = Entity(id, name, "FormalParameter");
        parameter["additionalType"] = type;
        return parameter;
    }

    /// <summary>A value that was given to a parameter.</summary>
    public static JsonObject Value(string id, string name, string value, string parameter)
    {
        var given = Entity(id, name, "PropertyValue");
        given["value"] = value;
        given["exampleOfWork"] = To(parameter);
        return given;
    }

    private static IEnumerable<JsonObject> Step(JournalEntry entry, StudyRecord record)
    {
        var plan = Entity(Id("step", entry), entry.Title, "HowToStep");
        plan["position"] = FormattableString.Invariant($"{entry.Number}");
        plan["workExample"] = To(ToolId(entry.StepType));
        var control = Entity(
            Id("control", entry),
            FormattableString.Invariant($"Step {entry.Number}, asked for by {entry.Line}"),
            "ControlAction"
        );
        control["instrument"] = To(Id("step", entry));
        control["object"] = To(Id("action", entry));
        var values = entry
            .Settings.Select(setting =>
                Value(
                    Id("action", entry) + "/" + Uri.EscapeDataString(setting.Name),
                    setting.Name,
                    setting.Text,
                    ParameterId(entry.StepType, setting.Name)
                )
            )
            .ToArray();
        return [plan, control, Action(entry, record, values), Artifact(entry, record), .. values];
    }

    private static JsonObject Action(JournalEntry entry, StudyRecord record, IEnumerable<JsonObject> values)
    {
        var read = entry.FilesRead.Distinct(StringComparer.Ordinal).ToHashSet(StringComparer.Ordinal);
        var action = Entity(Id("action", entry), entry.Title, "CreateAction");
        action["description"] = entry.Output.Describe();
        action["instrument"] = To(ToolId(entry.StepType));
        action["object"] = ToAll([
            .. entry.Inputs.Select(input => Id("artifact", input.Entry)).Distinct(StringComparer.Ordinal),
            .. record.Inputs.Where(input => read.Contains(input.Name)).Select(CrateFiles.IdOfInput),
            .. values.Select(value => value["@id"]!.GetValue<string>()),
        ]);
        action["result"] = ToAll(entry.FilesWritten.Select(IdOf).Prepend(Id("artifact", entry)));
        return action;
    }

    /// <summary>What a step gave: it lies in no file; its digest is that of its canonical binary form.</summary>
    private static JsonObject Artifact(JournalEntry entry, StudyRecord record)
    {
        var artifact = Entity(Id("artifact", entry), entry.Output.Describe(), "CreativeWork");
        artifact["sha256"] = entry.Output.Digest;
        var takers = record
            .Journal.SelectMany(later =>
                later
                    .Inputs.Where(input => input.Entry == entry.Number)
                    .Select(input => ParameterId(later.StepType, input.Name))
            )
            .Distinct(StringComparer.Ordinal)
            .ToArray();
        if (takers.Length > 0)
        {
            artifact["exampleOfWork"] = ToAll(takers);
        }

        return artifact;
    }
}
