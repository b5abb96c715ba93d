using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Tracing;
using RecipeRunner.Model.Rain;

namespace RecipeRunner.Cli.Printing;

/// <summary>A trace as a person would write it on paper: the hand-check table, then the way back.</summary>
internal static class TraceText
{
    private const int MostCells = 3;

    public static IEnumerable<string> Of(ValueTrace trace) =>
        [Heading(trace), "", .. Table(trace), .. Silent(trace), "", .. Steps(trace.Steps), "", .. Origins(trace)];

    /// <summary>A cell of a table: its value and meaning, then the steps behind it.</summary>
    public static IEnumerable<string> Of(CellTrace cell) =>
        [
            Text(
                    $"{cell.File}, line {cell.Line} ({cell.Row}), {cell.Column}: {(cell.Text.Length == 0 ? "blank" : $"{cell.Text} {cell.Unit}")}"
                )
                .TrimEnd(),
            $"  {cell.Meaning}",
            "",
            .. Steps(cell.Steps),
        ];

    private static string Heading(ValueTrace trace)
    {
        var value = trace.Value.DepthMillimetres is { } depth ? Text($"{depth:0.0###} mm") : "withheld";
        var name = string.Equals(trace.Basin, trace.BasinName, StringComparison.Ordinal) ? "" : " " + trace.BasinName;
        return $"{trace.Basin}{name}, from {trace.Interval.StartText} to {trace.Interval.EndText}: mean areal rainfall {value}";
    }

    private static IEnumerable<string> Table(ValueTrace trace)
    {
        var shares = trace.Account.Shares;
        if (shares.IsEmpty)
        {
            yield return "  No gauge gave it a value: too little reported.";
            yield break;
        }

        var width = Math.Max(5, shares.Max(share => share.Gauge.Length));
        yield return $"  {"gauge".PadRight(width)}  depth mm  status       distance km    area km²   weight  weight x depth mm";
        foreach (var share in shares)
        {
            yield return Text(
                $"  {share.Gauge.PadRight(width)}  {share.DepthMillimetres, 8:0.0##}  {share.Status.Word(), -11}  {share.DistanceMetres / 1000, 11:0.00}  {share.AreaSquareMetres / 1e6, 10:0.0000}  {share.Weight, 7:0.0000}  {share.ProductMillimetres, 17:0.0000}"
            );
        }

        yield return Text(
            $"  {"sum".PadRight(width)}  {"", 8}  {"", -11}  {"", 11}  {shares.Sum(share => share.AreaSquareMetres) / 1e6, 10:0.0000}  {shares.Sum(share => share.Weight), 7:0.0000}  {shares.Sum(share => share.ProductMillimetres), 17:0.0000}"
        );
    }

    private static IEnumerable<string> Silent(ValueTrace trace) =>
        trace.Account.Silent.Select(silent =>
            Text(
                $"  silent   {silent.Gauge}: {silent.Status.Word()}; with all gauges it speaks for {silent.AreaSquareMetres / 1e6:0.0000} km², weight {silent.Weight:0.0000}"
            )
        );

    private static IEnumerable<string> Steps(ImmutableArray<JournalEntry> steps) =>
        steps.Select(entry =>
            $"  step {Number(entry), -3} {entry.Title, -22} {entry.Line}   {Settings(entry)}".TrimEnd()
        );

    private static string Settings(JournalEntry entry) =>
        string.Join(
            "; ",
            entry
                .Settings.Where(setting => setting.Text.Length > 0)
                .Select(setting => $"{setting.Name}: {setting.Text}")
        );

    private static IEnumerable<string> Origins(ValueTrace trace)
    {
        foreach (var origin in trace.Origins)
        {
            var through = string.Join(
                ", ",
                origin.Steps.SkipLast(1).Select(entry => $"step {Number(entry)} {entry.Title}")
            );
            var cells = origin.Cells.Take(MostCells).Select(cell => $"{cell.Where}: \"{cell.Text}\"");
            var rest =
                origin.Cells.Length > MostCells ? Text($" and {origin.Cells.Length - MostCells} more cells") : "";
            var from = origin.Cells.IsEmpty
                ? $"step {Number(origin.Steps[^1])} {origin.Steps[^1].Title}"
                : string.Join("; ", cells);
            yield return $"  {origin.Gauge}   {from}{rest}{(through.Length > 0 ? $", through {through}" : "")}";
        }
    }

    private static string Number(JournalEntry entry) => entry.Number.ToString(CultureInfo.InvariantCulture);

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
