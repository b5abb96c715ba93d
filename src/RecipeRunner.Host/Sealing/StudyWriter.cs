using System.Reflection;
using System.Text.Json.Nodes;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Sealing.Crates;
using RecipeRunner.Host.Summarising;

namespace RecipeRunner.Host.Sealing;

/// <summary>Writes the files that tell of a study: audit, summary, crate, and the run's own circumstances.</summary>
internal static class StudyWriter
{
    /// <summary>The name of the crate's description: its dates are the run's own.</summary>
    public const string CrateName = "ro-crate-metadata.json";

    private const string AuditName = "audit.json";
    private const string SchemaName = "audit.schema.json";
    private const string SummaryName = "summary.html";

    public static void Write(StudyRecord record, string payload, Instant started, Duration elapsed)
    {
        File.WriteAllBytes(Path.Combine(payload, AuditName), CanonicalJson.Of(AuditDocument.Of(record)));
        File.WriteAllBytes(Path.Combine(payload, SchemaName), Schema());
        File.WriteAllText(Path.Combine(payload, SummaryName), SummaryPage.Of(record));
        FileRecord[] telling =
        [
            .. new[] { AuditName, SchemaName, SummaryName }.Select(name => FileDigest.Of(payload, name)),
        ];
        JsonFile.Write(Path.Combine(payload, CrateName), Crate.Of(record, telling, started, started + elapsed));
        JsonFile.Write(Path.Combine(payload, "run.json"), Circumstances(started, elapsed));
    }

    private static byte[] Schema()
    {
        using var stream = Assembly
            .GetExecutingAssembly()
            .GetManifestResourceStream($"RecipeRunner.Host.Sealing.{SchemaName}")!;
        var bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        return bytes;
    }

    /// <summary>The clock and the machine: outside every comparison between runs.</summary>
    private static JsonObject Circumstances(Instant started, Duration elapsed) =>
        new()
        {
            ["started"] = InstantPattern.ExtendedIso.Format(started),
            ["seconds"] = Math.Round(elapsed.TotalSeconds, 3),
            ["tool"] = $"Recipe Runner {ToolVersion.Text}",
            ["runtime"] = System.Runtime.InteropServices.RuntimeInformation.FrameworkDescription,
            ["system"] = System.Runtime.InteropServices.RuntimeInformation.OSDescription,
            ["processors"] = Environment.ProcessorCount,
        };
}
