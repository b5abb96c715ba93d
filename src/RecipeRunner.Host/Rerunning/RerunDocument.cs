using System.Text.Json.Nodes;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Summarising;

namespace RecipeRunner.Host.Rerunning;

/// <summary>A rerun's findings for an auditor to attach: as a page, or as JSON.</summary>
public static class RerunDocument
{
    /// <summary>The page, self-contained.</summary>
    /// <param name="report">The report.</param>
    /// <param name="study">The study as the person named it.</param>
    public static string Page(RerunReport report, string study)
    {
        var page = PageFrame
            .Open($"Rerun of {study}")
            .Element("h1", $"Rerun: {RerunWords.Verdict(report).ToLowerInvariant()}")
            .Element("p", RerunWords.Sentence(report, study) + ".")
            .Raw("<dl>");
        foreach (var (name, text) in Facts(report).Where(fact => fact.Text.Length > 0))
        {
            page.Element("dt", name).Element("dd", text);
        }

        page.Raw("</dl>").Element("p class=\"caution\"", Caution.Text).Element("h2", "Reasons");
        page.Table("What was found", ["about", "finding"], RerunWords.Reasons(report).Select(Cells));
        page.Element(
            "p",
            "The seal was checked byte by byte; the enclosed recipe was run on the enclosed inputs in a place of its own; nothing was written into the study."
        );
        return PageFrame.Close(page);
    }

    /// <summary>All of the report as JSON.</summary>
    /// <param name="report">The report.</param>
    /// <param name="study">The study as the person named it.</param>
    public static string Json(RerunReport report, string study) =>
        JsonFile.Text(
            new JsonObject
            {
                ["verdict"] = RerunWords.Verdict(report).ToLowerInvariant(),
                ["study"] = study,
                ["title"] = report.Title,
                ["made_with"] = report.MadeWith,
                ["rerun_with"] = $"Recipe Runner {ToolVersion.Text}",
                ["signer"] = report.Signer is { } signer
                    ? new JsonObject
                    {
                        ["key_type"] = signer.KeyType,
                        ["fingerprint"] = signer.Fingerprint,
                        ["identity"] = signer.Identity,
                    }
                    : null,
                ["tolerance"] = RerunReport.Tolerance,
                ["files_compared"] = report.Files.Compared,
                ["files_same"] = report.Files.Same,
                ["values_beyond_tolerance"] = report.BeyondCount,
                ["first_step"] = report.FirstStep?.Number,
                ["differing_files"] = new JsonArray([.. report.DifferingFiles.Select(file => JsonValue.Create(file))]),
                ["largest_within"] = report.LargestWithin is { } within ? ValueOf(within) : null,
                ["worst"] = new JsonArray([.. report.Worst.Select(ValueOf)]),
                ["problems"] = new JsonArray([
                    .. report.Problems.Select(problem => new JsonObject
                    {
                        ["code"] = problem.Code,
                        ["where"] = problem.Where.ToString(),
                        ["what"] = problem.What,
                        ["mend"] = problem.Mend,
                    }),
                ]),
            }
        );

    private static IEnumerable<(string Name, string Text)> Facts(RerunReport report) =>
        [("title", report.Title), ("made with", report.MadeWith), ("rerun with", $"Recipe Runner {ToolVersion.Text}")];

    private static string[] Cells((string Word, string Text) reason) => [reason.Word, reason.Text];

    private static JsonObject ValueOf(ValueDifference value) =>
        new()
        {
            ["file"] = value.File,
            ["row"] = value.Row,
            ["column"] = value.Column,
            ["was"] = value.Was,
            ["is"] = value.Is,
        };
}
