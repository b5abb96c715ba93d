using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace RecipeRunner.Host.Sealing;

/// <summary>Writes JSON that is the same on every machine and pleasant to read: two spaces, "\n", UTF-8, one line end last.</summary>
internal static class JsonFile
{
    private static readonly JsonSerializerOptions Options = new()
    {
        WriteIndented = true,
        NewLine = "\n",
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    };

    /// <summary>The document as text, without the last line end.</summary>
    public static string Text(JsonNode document) => document.ToJsonString(Options);

    /// <summary>Writes the document into a new file.</summary>
    public static void Write(string path, JsonNode document)
    {
        using var stream = new FileStream(path, FileMode.CreateNew, FileAccess.Write);
        JsonSerializer.Serialize(stream, document, Options);
        stream.WriteByte((byte)'\n');
    }
}
