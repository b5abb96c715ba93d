using System.Globalization;
using System.Net;
using System.Text;

namespace RecipeRunner.Host.Summarising;

/// <summary>Builds a page from elements; every text is escaped.</summary>
internal sealed class Html
{
    private readonly StringBuilder text = new();

    /// <summary>Markup as it is: only for markup that this room wrote.</summary>
    public Html Raw(string markup)
    {
        text.Append(markup).Append('\n');
        return this;
    }

    /// <summary>An element that holds text.</summary>
    /// <param name="open">Its name with attributes that this room wrote, such as <c>p class="note"</c>.</param>
    /// <param name="content">Any text.</param>
    public Html Element(string open, string content)
    {
        var name = open.Split(' ')[0];
        return Raw($"<{open}>{Escape(content)}</{name}>");
    }

    /// <summary>A table whose first column names the row.</summary>
    /// <param name="caption">What it shows.</param>
    /// <param name="heads">Column heads; one that starts with <c>&gt;</c> stands over numbers, set to the right.</param>
    /// <param name="rows">Cells, a row each.</param>
    public Html Table(string caption, IReadOnlyList<string> heads, IEnumerable<IReadOnlyList<string>> rows)
    {
        Raw("<div class=\"wide\" tabindex=\"0\" role=\"region\" aria-label=\"Table\"><table>")
            .Element("caption", caption);
        Raw(
            "<thead><tr>"
                + string.Concat(
                    heads.Select(head => $"<th scope=\"col\"{Class(head)}>{Escape(head.TrimStart('>'))}</th>")
                )
                + "</tr></thead><tbody>"
        );
        foreach (var row in rows)
        {
            var cells = row.Skip(1).Select((cell, i) => $"<td{Class(heads[i + 1])}>{Escape(cell)}</td>");
            Raw($"<tr><th scope=\"row\">{Escape(row[0])}</th>{string.Concat(cells)}</tr>");
        }

        return Raw("</tbody></table></div>");
    }

    /// <summary>Text safe in markup; characters that a page cannot hold, or that turn text around, become a blot.</summary>
    public static string Escape(string content)
    {
        var safe = new StringBuilder(content.Length);
        foreach (var letter in content)
        {
            var steers =
                char.IsControl(letter)
                || letter is (>= '\u202A' and <= '\u202E') or (>= '\u2066' and <= '\u2069') or '\u200E' or '\u200F';
            safe.Append(steers ? '\uFFFD' : letter);
        }

        return WebUtility.HtmlEncode(safe.ToString());
    }

    /// <summary>A number for people.</summary>
    public static string Number(double value, string format) => value.ToString(format, CultureInfo.InvariantCulture);

    /// <inheritdoc/>
    public override string ToString() => text.ToString();

    private static string Class(string head) => head.StartsWith('>') ? " class=\"n\"" : "";
}
