using System.Globalization;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Sealing;

/// <summary>
/// JSON in the canonical form of RFC 8785, so that equal documents have equal digests. Of numbers it takes whole ones that a double
/// holds exactly; any other is a fault of whoever made the document.
/// </summary>
internal static class CanonicalJson
{
    private const long LargestWhole = 1L << 53;

    private static readonly UTF8Encoding Strict = new(
        encoderShouldEmitUTF8Identifier: false,
        throwOnInvalidBytes: true
    );

    /// <summary>The canonical bytes.</summary>
    /// <exception cref="RefusedException">A text holds half a character.</exception>
    public static byte[] Of(JsonNode? document)
    {
        var text = new StringBuilder();
        Write(text, document);
        try
        {
            return Strict.GetBytes(text.ToString());
        }
        catch (EncoderFallbackException)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0707",
                    new Place(),
                    "A title, note, setting or name holds half of a character (a lone surrogate), which no file can hold.",
                    "Take it out of the recipe or the data."
                )
            );
        }
    }

    private static void Write(StringBuilder text, JsonNode? node)
    {
        switch (node)
        {
            case null:
                text.Append("null");
                break;
            case JsonObject members:
                WriteObject(text, members);
                break;
            case JsonArray items:
                WriteArray(text, items);
                break;
            default:
                WriteValue(text, node.AsValue());
                break;
        }
    }

    /// <summary>RFC 8785, section 3.2.3: members in the order of their names' UTF-16 code units.</summary>
    private static void WriteObject(StringBuilder text, JsonObject members)
    {
        var separator = '{';
        foreach (var (name, value) in members.OrderBy(member => member.Key, StringComparer.Ordinal))
        {
            text.Append(separator);
            WriteText(text, name);
            text.Append(':');
            Write(text, value);
            separator = ',';
        }

        text.Append(separator == '{' ? "{}" : "}");
    }

    private static void WriteArray(StringBuilder text, JsonArray items)
    {
        text.Append('[');
        for (var i = 0; i < items.Count; i++)
        {
            text.Append(i > 0 ? "," : "");
            Write(text, items[i]);
        }

        text.Append(']');
    }

    private static void WriteValue(StringBuilder text, JsonValue value)
    {
        switch (value.GetValueKind())
        {
            case JsonValueKind.String:
                WriteText(text, value.GetValue<string>());
                break;
            case JsonValueKind.Number:
                text.Append(Whole(value).ToString(CultureInfo.InvariantCulture));
                break;
            default:
                text.Append(value.GetValue<bool>() ? "true" : "false");
                break;
        }
    }

    private static long Whole(JsonValue value) =>
        long.TryParse(value.ToJsonString(), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out var whole)
        && whole is >= -LargestWhole and <= LargestWhole
            ? whole
            : throw new InvalidOperationException($"{value.ToJsonString()} is no whole number up to 2^53.");

    /// <summary>RFC 8785, section 3.2.2.2: short escapes where JSON has them, others in lower case, all else as it is.</summary>
    private static void WriteText(StringBuilder text, string content)
    {
        text.Append('"');
        foreach (var letter in content)
        {
            _ = letter switch
            {
                '"' => text.Append("\\\""),
                '\\' => text.Append("\\\\"),
                '\b' => text.Append("\\b"),
                '\t' => text.Append("\\t"),
                '\n' => text.Append("\\n"),
                '\f' => text.Append("\\f"),
                '\r' => text.Append("\\r"),
                < ' ' => text.Append("\\u").Append(((int)letter).ToString("x4", CultureInfo.InvariantCulture)),
                _ => text.Append(letter),
            };
        }

        text.Append('"');
    }
}
