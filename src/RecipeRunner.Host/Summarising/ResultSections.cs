using System.Globalization;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Summarising;

/// <summary>The page's sections on what steps gave: rain, totals, weights. Long tables are cut, and say so.</summary>
internal static class ResultSections
{
    private const int MostRows = 400;
    private const int MostSeries = 60;

    /// <summary>What a step gave, under a heading that says which step it was and how it was set.</summary>
    public static void Add(Html page, JournalEntry entry)
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
            case IShownTable shown:
                ShownSection(page, shown, from);
                break;
        }
    }

    private static void RainSection(Html page, ArealRainfall areal, string from)
    {
        page.Element("h2", "Basins");
        var basins = areal.Basins.Basins;
        page.Table(
            $"Mean areal rainfall, {areal.Times.Count.ToString("N0", CultureInfo.InvariantCulture)} {areal.Times.Step.ToSettingText()} from {areal.Times}. {from}",
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
        var values = Enumerable.Range(0, areal.Times.Count).Select(t => areal.At(t, b)).ToArray();
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

    private static void ShownSection(Html page, IShownTable shown, string from)
    {
        var table = shown.ToTable();
        page.Element("h2", shown.Heading);
        page.Table(
            from,
            [.. table.Columns.Select(HeadingOf)],
            Enumerable
                .Range(0, Math.Min(table.RowCount, MostRows))
                .Select(row => (string[])[.. table.Columns.Select(column => CellOf(column, row))])
        );
        TellOfRest(page, table.RowCount - MostRows, "rows");
    }

    /// <summary>The column's name, in words that a narrow page can break.</summary>
    private static string HeadingOf(Column column) =>
        (column.Kind == ColumnKind.Text ? "" : ">") + column.Name.Replace('_', ' ');

    private static string CellOf(Column column, int row) =>
        column.Kind == ColumnKind.Text ? column.Texts[row]
        : column.Numbers[row] is not { } number ? ""
        : Html.Number(number, column.Kind == ColumnKind.Count ? "0" : "0.0##");

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
}
