using System.Globalization;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Summarising;

/// <summary>The page for people: self-contained, without script, printable.</summary>
internal static class SummaryPage
{
    /// <summary>The page's markup.</summary>
    public static string Of(StudyRecord record)
    {
        var page = PageFrame.Open(record.Title);
        Opening(page, record);
        FindingsSection(page, record);
        if (record.MainWeights is { } weights)
        {
            MapSection(page, weights, record);
        }

        var results = record.Journal.DistinctBy(entry => entry.Output.Digest, StringComparer.Ordinal);
        foreach (var entry in results.OrderBy(entry => entry.Output is WeightTable))
        {
            ResultSections.Add(page, entry);
        }

        StepsSection(page, record);
        SourcesSection(page, record);
        CautionSection(page, record);
        FilesSection(page, record);
        RerunSection(page, record);
        return PageFrame.Close(page);
    }

    private static void Opening(Html page, StudyRecord record)
    {
        page.Element("h1", record.Title);
        foreach (var note in record.Notes)
        {
            page.Element("p", note);
        }

        page.Raw("<dl>");
        foreach (var (name, text) in StudyFacts.Of(record))
        {
            page.Element("dt", name).Element("dd", text);
        }

        foreach (var setting in record.Settings)
        {
            page.Element("dt", setting.Name)
                .Element("dd", setting.Value + (setting.IsDefault ? " (default)" : " (given)"));
        }

        page.Raw("</dl>").Element("p class=\"caution\"", Caution.Text);
    }

    private static void FindingsSection(Html page, StudyRecord record)
    {
        page.Element("h2", "Findings");
        if (record.Findings.IsEmpty)
        {
            page.Element("p", "None.");
            return;
        }

        page.Raw("<ul class=\"findings\">");
        foreach (var finding in record.Findings)
        {
            var word = SeverityWord.Of(finding.Severity);
            var where = finding.Where.ToString();
            var text = $"{(where.Length > 0 ? where + ": " : "")}{finding.What} {finding.Mend}".TrimEnd();
            page.Raw($"<li class=\"{word}\"><b>{word}</b> {Html.Escape(finding.Code)} {Html.Escape(text)}</li>");
        }

        page.Raw("</ul>");
    }

    private static void MapSection(Html page, WeightTable weights, StudyRecord record)
    {
        page.Element("h2", "Map").Raw(MapDrawing.Of(weights, record));
        page.Element(
            "p class=\"key\"",
            $"Filled areas: basins. Thin lines: Thiessen cells. Filled circle: gauge with weight. Open square: gauge without weight. Cross: gauge without any record. Working grid {weights.Basins.ReferenceSystem.Label}, {weights.Basins.ReferenceSystem.Name}."
        );
    }

    private static void StepsSection(Html page, StudyRecord record)
    {
        page.Element("h2", "How it was done");
        page.Table(
            "The steps, in the order in which they ran",
            ["step", "what", "with", "gave", "recipe line"],
            record.Journal.Select(StepRow)
        );
    }

    private static string[] StepRow(JournalEntry entry)
    {
        var settings = entry
            .Settings.Where(setting => setting.Text.Length > 0)
            .Select(setting => $"{setting.Name}: {setting.Text}");
        var inputs = entry.Inputs.Select(input =>
            string.Create(CultureInfo.InvariantCulture, $"{input.Name}: step {input.Entry}")
        );
        var facts = entry.Statements.Select(statement => $"{statement.Name}: {statement.Value}");
        var source = entry.Source.Length > 0 ? $" ({entry.Source})" : "";
        return
        [
            entry.Number.ToString(CultureInfo.InvariantCulture),
            entry.Title + source,
            string.Join("; ", inputs.Concat(settings)),
            string.Join("; ", facts.Prepend(entry.Output.Describe())),
            entry.Line.ToString(),
        ];
    }

    private static void SourcesSection(Html page, StudyRecord record)
    {
        page.Element("h2", "Where the data come from");
        if (!record.Sources.IsEmpty)
        {
            page.Table(
                "Sources, as the recipe states them",
                ["data", "source", "licence"],
                record.Sources.Select(source => (string[])[source.File, source.Text, source.Licence ?? "not stated"])
            );
        }

        var stated = record.Sources.SelectMany(source => source.Inputs).ToHashSet(StringComparer.Ordinal);
        var silent = record.Inputs.Where(input => !stated.Contains(input.Path)).Select(input => input.Name).ToArray();
        if (silent.Length > 0)
        {
            page.Element("p", $"The recipe states no source of {string.Join(", ", silent)}.");
        }
    }

    private static void CautionSection(Html page, StudyRecord record)
    {
        page.Element("h2", "Assumptions and caution").Raw("<ul>");
        foreach (var assumption in record.Assumptions)
        {
            page.Element("li", assumption);
        }

        page.Raw("</ul>").Element("p class=\"caution\"", Caution.Text);
    }

    private static void FilesSection(Html page, StudyRecord record)
    {
        page.Element("h2", "Files");
        var files = record.RecipeFiles.Concat(record.Inputs).Concat(record.Outputs);
        page.Table(
            "Recipe, data and results, with their SHA-256 digests",
            ["file", ">bytes", "SHA-256"],
            files.Select(file => (string[])[NameOf(file), Html.Number(file.Bytes, "N0"), file.Sha256])
        );
    }

    private static string NameOf(FileRecord file) => file.IsHeld ? file.Path : $"{file.Name} (not held by this study)";

    private static void RerunSection(Html page, StudyRecord record)
    {
        page.Element("h2", "How to check and repeat it");
        page.Element(
            "p",
            $"In the study's folder, sha256sum -c manifest-sha256.txt verifies every file. {WhereInputsAre(record)} This runs the recipe again, to compare file by file:"
        );
        var settings = string.Concat(
            record
                .Settings.Where(setting => !setting.IsDefault)
                .Select(setting => $" --set {ShellWord.Of($"{setting.Name}={setting.Value}")}")
        );
        page.Element(
            "pre",
            $"recipe-runner run {ShellWord.Of($"data/recipe/{record.RecipeName}")} --data {DataFolder(record)} --into ../again.study{settings}"
        );
        page.Element("p", $"Made with Recipe Runner {ToolVersion.Text}.");
    }

    private static bool HoldsAll(StudyRecord record) => record.Inputs.All(input => input.IsHeld);

    private static string WhereInputsAre(StudyRecord record) =>
        HoldsAll(record)
            ? "The recipe and the data are inside."
            : "The recipe is inside; data too large to hold are listed with their digests, and DIR stands for the folder that has all of the data.";

    private static string DataFolder(StudyRecord record) =>
        record.Inputs.IsEmpty ? "data/recipe"
        : HoldsAll(record) ? "data/inputs"
        : "DIR";
}
