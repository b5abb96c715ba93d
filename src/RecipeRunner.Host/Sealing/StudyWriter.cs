using System.Text.Json.Nodes;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Summarising;

namespace RecipeRunner.Host.Sealing;

/// <summary>Writes the files that tell of a study: audit, summary, crate, and the run's own circumstances.</summary>
internal static class StudyWriter
{
    public static void Write(StudyRecord record, string payload, Instant started, Duration elapsed)
    {
        JsonFile.Write(Path.Combine(payload, "audit.json"), AuditDocument.Of(record));
        File.WriteAllText(Path.Combine(payload, "summary.html"), SummaryPage.Of(record));
        JsonFile.Write(Path.Combine(payload, "ro-crate-metadata.json"), Crate.Of(record));
        JsonFile.Write(Path.Combine(payload, "run.json"), Circumstances(started, elapsed));
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
