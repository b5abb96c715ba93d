using System.Globalization;
using System.Reflection;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Summarising;

/// <summary>The page for people: self-contained, without script, printable.</summary>
internal static class SummaryPage
{
    private const int MostRows = 400;
    private const int MostSeries = 60;

    /// <summary>The page's markup.</summary>
    public static string Of(StudyRecord record)
    {
        var page = new Html();
        page.Raw("<!DOCTYPE html>")
            .Raw(
                "<html lang=\"en\"><head><meta charset=\"utf-8\"><meta name=\"viewport\" content=\"width=device-width\">"
            );
        page.Element("title", record.Title).Raw($"<style>{Style()}</style></head><body><main>");
        Opening(page, record);
        FindingsSection(page, record);
        if (record.MainWeights is { } weights)
        {
            MapSection(page, weights, record);
        }

        var results = record.Journal.DistinctBy(entry => entry.Output.Digest, StringComparer.Ordinal);
        foreach (var entry in results.OrderBy(entry => entry.Output is WeightTable))
        {
            ResultSection(page, entry);
        }

        StepsSection(page, record);
        CautionSection(page, record);
        FilesSection(page, record);
        RerunSection(page, record);
        return page.Raw("</main></body></html>").ToString();
    }

    /// <summary>What a step gave, under a heading that says which step it was and how it was set.</summary>
    private static void ResultSection(Html page, JournalEntry entry)
    {
        var settings = string.Join(
            ", ",
            entry
                .Settings.Where(setting => setting.Text.Length > 0)
                .Select(setting => $"{setting.Name}: {setting.Text}")
        );
        var from = string.Create(
            CultureInfo.InvariantCulture,
            $"Step {entry.Number}{(settings.Length > 0 ? "; " + settings : "")}."
        );
        switch (entry.Output)
        {
            case ArealRainfall areal:
                RainSection(page, areal, from);
                break;
            case ArealTotals totals:
                TotalsSection(page, totals, from);
                break;
            case WeightTable weights:
                WeightsSection(page, weights, from);
                break;
        }
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

    private static void RainSection(Html page, ArealRainfall areal, string from)
    {
        page.Element("h2", "Basins");
        var basins = areal.Basins.Basins;
        page.Table(
            $"Mean areal rainfall, {areal.Labels.Length.ToString("N0", CultureInfo.InvariantCulture)} {areal.Step.ToSettingText()} from {areal.Step.LabelText(areal.Labels[0])} to {areal.Step.LabelText(areal.Labels[^1])}",
            [
                "basin",
                "name",
                ">area km²",
                ">sum of given values mm",
                ">wettest step mm",
                ">steps withheld",
                ">mean share of weight reporting",
            ],
            basins.Take(MostRows).Select((_, b) => BasinRow(areal, b))
        );
        TellOfRest(page, basins.Length - MostRows, "basins");
        page.Element("h2", "Rain through time");
        page.Element(
            "p class=\"key\"",
            "Bars: mean areal rainfall. Strip under them: share of the basin's weight that reported, full height for all. Dark marks above the strip: values withheld."
        );
        for (var b = 0; b < Math.Min(basins.Length, MostSeries); b++)
        {
            page.Raw("<figure>")
                .Element("figcaption", $"{basins[b].Id} {basins[b].Name}")
                .Raw(SeriesDrawing.Of(areal, b))
                .Raw("</figure>");
        }

        TellOfRest(page, basins.Length - MostSeries, "basins");
    }

    private static string[] BasinRow(ArealRainfall areal, int b)
    {
        var values = Enumerable.Range(0, areal.Labels.Length).Select(t => areal.At(t, b)).ToArray();
        var withheld = values.Count(value => value.Status == ArealStatus.Withheld);
        return
        [
            areal.Basins.Basins[b].Id,
            areal.Basins.Basins[b].Name,
            Html.Number(areal.Basins.Basins[b].Shape.Area / 1e6, "N2"),
            Html.Number(values.Sum(value => value.DepthMillimetres ?? 0), "N1"),
            Html.Number(values.Max(value => value.DepthMillimetres ?? 0), "N1"),
            Html.Number(withheld, "N0"),
            Html.Number(100 * values.Average(value => value.WeightReporting), "0.0") + " %",
        ];
    }

    /// <summary>Basins or periods across, whichever are fewer.</summary>
    private static void TotalsSection(Html page, ArealTotals totals, string from)
    {
        page.Element("h2", "Totals");
        var caption = $"Total areal rainfall in mm over {totals.Period.ToSettingText()}; blank where withheld. {from}";
        var basins = totals.Basins.Basins;
        var periods = totals.Starts.Select(totals.Period.NameOf).ToArray();
        string Cell(int p, int b) => totals.At(p, b).DepthMillimetres is { } depth ? Html.Number(depth, "N1") : "";
        if (basins.Length <= periods.Length)
        {
            page.Table(
                caption,
                ["period", .. basins.Select(basin => ">" + basin.Id)],
                periods.Take(MostRows).Select((name, p) => (string[])[name, .. basins.Select((_, b) => Cell(p, b))])
            );
        }
        else
        {
            page.Table(
                caption,
                ["basin", .. periods.Select(name => ">" + name)],
                basins
                    .Take(MostRows)
                    .Select((basin, b) => (string[])[basin.Id, .. periods.Select((_, p) => Cell(p, b))])
            );
        }

        TellOfRest(page, Math.Max(basins.Length, periods.Length) - MostRows, "rows");
    }

    private static void TellOfRest(Html page, int rest, string what)
    {
        if (rest > 0)
        {
            page.Element("p", string.Create(CultureInfo.InvariantCulture, $"{rest} more {what} are in the tables."));
        }
    }

    private static void WeightsSection(Html page, WeightTable weights, string from)
    {
        page.Element("h2", "Weights");
        page.Table(
            $"Share of each basin that is nearest to each gauge. {from}",
            ["basin", "gauge", ">area km²", ">weight"],
            weights
                .Weights.Take(MostRows)
                .Select(weight =>
                    (string[])
                        [
                            weights.Basins.Basins[weight.Basin].Id,
                            weights.Cells.Gauges.Gauges[weight.Gauge].Id,
                            Html.Number(weight.AreaSquareMetres / 1e6, "N3"),
                            Html.Number(weight.Share, "0.0000"),
                        ]
                )
        );
        TellOfRest(page, weights.Weights.Length - MostRows, "weights");
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
            files.Select(file => (string[])[file.Path, Html.Number(file.Bytes, "N0"), file.Sha256])
        );
    }

    private static void RerunSection(Html page, StudyRecord record)
    {
        page.Element("h2", "How to check and repeat it");
        page.Element(
            "p",
            "In the study's folder, sha256sum -c manifest-sha256.txt verifies every file. The recipe and the data are inside; this runs them again, to compare file by file:"
        );
        var settings = string.Concat(
            record
                .Settings.Where(setting => !setting.IsDefault)
                .Select(setting => $" --set {ShellWord.Of($"{setting.Name}={setting.Value}")}")
        );
        page.Element(
            "pre",
            $"recipe-runner run {ShellWord.Of($"data/recipe/{record.RecipeName}")} --data {(record.Inputs.IsEmpty ? "data/recipe" : "data/inputs")} --into ../again.study{settings}"
        );
        page.Element("p", $"Made with Recipe Runner {ToolVersion.Text}.");
    }

    private static string Style()
    {
        using var stream = Assembly
            .GetExecutingAssembly()
            .GetManifestResourceStream("RecipeRunner.Host.Summarising.summary.css")!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
