using System.Text.Json.Nodes;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Host.Running;
using static RecipeRunner.Host.Sealing.Crates.CrateEntity;

namespace RecipeRunner.Host.Sealing.Crates;

/// <summary>
/// The payload as an RO-Crate 1.1 that follows the Provenance Run Crate profile 0.5: the recipe is the workflow, the run the action
/// that used it. Its only dates are those of the run, which RO-Crate asks for; a comparison of studies passes over them.
/// </summary>
internal static class Crate
{
    /// <summary>The id of the run.</summary>
    public const string Run = "#run";

    private const string EngineRun = "#run-of-the-tool";
    private const string Engine = "#recipe-runner";
    private const string Language = "#csharp";
    private const string Specification = "https://w3id.org/ro/crate/1.1";
    private const string WorkflowCrate = "https://w3id.org/workflowhub/workflow-ro-crate/1.0";

    private static readonly (string Id, string Name, string Version)[] Profiles =
    [
        ("https://w3id.org/ro/wfrun/process/0.5", "Process Run Crate", "0.5"),
        ("https://w3id.org/ro/wfrun/workflow/0.5", "Workflow Run Crate", "0.5"),
        ("https://w3id.org/ro/wfrun/provenance/0.5", "Provenance Run Crate", "0.5"),
        (WorkflowCrate, "Workflow RO-Crate", "1.0"),
    ];

    /// <summary>The crate's description.</summary>
    /// <param name="record">What was done.</param>
    /// <param name="telling">The files that tell of it, but for the run's circumstances.</param>
    /// <param name="started">When the run began.</param>
    /// <param name="ended">When its last result was written.</param>
    public static JsonObject Of(StudyRecord record, IReadOnlyList<FileRecord> telling, Instant started, Instant ended)
    {
        JsonObject[] parts =
        [
            .. telling.Select(CrateFiles.Telling),
            CrateFiles.Circumstances(),
            Workflow(record),
            .. record.RecipeFiles.Where(file => !IsRecipe(file, record)).Select(Loaded),
            .. record.Inputs.Where(input => input.IsHeld).Select(input => CrateFiles.Input(input, record)),
            .. record.Outputs.Select(CrateFiles.Output),
        ];
        return new JsonObject
        {
            ["@context"] = new JsonArray(
                "https://w3id.org/ro/crate/1.1/context",
                "https://w3id.org/ro/terms/workflow-run/context"
            ),
            ["@graph"] = new JsonArray([
                Descriptor(),
                Root(record, parts, ended),
                .. Profiles.Select(Profile),
                .. CrateLicences.Entities(record),
                .. parts,
                .. record.Inputs.Where(input => !input.IsHeld).Select(input => CrateFiles.Input(input, record)),
                .. Parameters(record),
                Software(),
                ProgrammingLanguage(),
                .. Runs(record, started, ended),
                .. CrateSteps.Entities(record),
            ]),
        };
    }

    private static JsonObject Descriptor() =>
        new()
        {
            ["@id"] = "ro-crate-metadata.json",
            ["@type"] = "CreativeWork",
            ["conformsTo"] = ToAll([Specification, WorkflowCrate]),
            ["about"] = To("./"),
        };

    private static JsonObject Root(StudyRecord record, IEnumerable<JsonObject> parts, Instant ended)
    {
        var root = Entity("./", record.Title, "Dataset");
        root["description"] =
            $"Mean areal precipitation made by the recipe {record.RecipeName} with Recipe Runner {ToolVersion.Text}.";
        root["datePublished"] = LocalDatePattern.Iso.Format(ended.InUtc().Date);
        root["license"] = CrateLicences.Root;
        root["conformsTo"] = ToAll(Profiles.Select(profile => profile.Id));
        root["hasPart"] = ToAll(parts.Select(part => part["@id"]!.GetValue<string>()));
        root["mainEntity"] = To(RecipeId(record));
        root["mentions"] = ToAll([
            Run,
            EngineRun,
            .. CrateSteps.Actions(record),
            .. record.Inputs.Where(input => !input.IsHeld).Select(CrateFiles.IdOfInput),
        ]);
        return root;
    }

    private static JsonObject Profile((string Id, string Name, string Version) profile)
    {
        var entity = Entity(profile.Id, profile.Name, "CreativeWork");
        entity["version"] = profile.Version;
        return entity;
    }

    private static JsonObject Workflow(StudyRecord record)
    {
        var recipe = record.RecipeFiles.Single(file => IsRecipe(file, record));
        var workflow = CrateFiles.File(recipe, "SoftwareSourceCode", "ComputationalWorkflow", "HowTo");
        workflow["programmingLanguage"] = To(Language);
        workflow["input"] = ToAll([
            .. record.Settings.Select(setting => LocalId("setting", setting.Name)),
            .. record.Inputs.Select(input => LocalId("input", input.Name)),
        ]);
        workflow["output"] = ToAll(record.Outputs.Select(output => LocalId("output", output.Path)));
        workflow["hasPart"] = ToAll([
            .. CrateSteps.Tools(record),
            .. record.RecipeFiles.Where(file => !IsRecipe(file, record)).Select(file => IdOf(file.Path)),
        ]);
        workflow["step"] = ToAll(CrateSteps.Plans(record));
        return workflow;
    }

    private static JsonObject Loaded(FileRecord file)
    {
        var loaded = CrateFiles.File(file, "SoftwareSourceCode");
        loaded["programmingLanguage"] = To(Language);
        return loaded;
    }

    /// <summary>What the recipe takes and gives: its settings, the files that it reads, the files that it writes.</summary>
    private static IEnumerable<JsonObject> Parameters(StudyRecord record) =>
        [
            .. record.Settings.Select(setting =>
                CrateSteps.Parameter(LocalId("setting", setting.Name), setting.Name, "Text")
            ),
            .. record.Settings.Select(setting =>
                CrateSteps.Value(ValueId(setting), setting.Name, setting.Value, LocalId("setting", setting.Name))
            ),
            .. record.Inputs.Select(input => CrateSteps.Parameter(LocalId("input", input.Name), input.Name, "File")),
            .. record.Outputs.Select(output =>
                CrateSteps.Parameter(LocalId("output", output.Path), output.Path, "File")
            ),
        ];

    private static IEnumerable<JsonObject> Runs(StudyRecord record, Instant started, Instant ended)
    {
        var run = Timed(Entity(Run, $"Run of {record.RecipeName}", "CreateAction"), started, ended);
        run["instrument"] = To(RecipeId(record));
        run["object"] = ToAll([.. record.Inputs.Select(CrateFiles.IdOfInput), .. record.Settings.Select(ValueId)]);
        run["result"] = ToAll(record.Outputs.Select(output => IdOf(output.Path)));
        var whole = Timed(
            Entity(EngineRun, $"Run of Recipe Runner {ToolVersion.Text}", "OrganizeAction"),
            started,
            ended
        );
        whole["instrument"] = To(Engine);
        whole["object"] = ToAll(CrateSteps.Controls(record));
        whole["result"] = To(Run);
        return [run, whole];
    }

    private static JsonObject Timed(JsonObject action, Instant started, Instant ended)
    {
        action["startTime"] = InstantPattern.General.Format(started);
        action["endTime"] = InstantPattern.General.Format(ended);
        return action;
    }

    private static JsonObject Software()
    {
        var software = Entity(Engine, "Recipe Runner", "SoftwareApplication");
        software["softwareVersion"] = ToolVersion.Text;
        return software;
    }

    private static JsonObject ProgrammingLanguage()
    {
        var language = Entity(Language, "C#", "ComputerLanguage");
        language["alternateName"] = "C# script";
        language["url"] = To("https://learn.microsoft.com/dotnet/csharp/");
        return language;
    }

    private static string ValueId(SettingUsed setting) => LocalId("setting", setting.Name, "value");

    private static string RecipeId(StudyRecord record) => IdOf("recipe/" + record.RecipeName);

    private static bool IsRecipe(FileRecord file, StudyRecord record) =>
        string.Equals(file.Name, record.RecipeName, StringComparison.Ordinal);
}
