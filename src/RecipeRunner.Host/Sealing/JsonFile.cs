using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace RecipeRunner.Host.Sealing;

/// <summary>Writes JSON that is the same on every machine and pleasant to read: two spaces, "\n", UTF-8, one line end last.</summary>
internal static class JsonFile
{
    private static readonly JsonWriterOptions Options = new()
    {
        Indented = true,
        NewLine = "\n",
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    };

    public static void Write(string path, JsonNode document)
    {
        using var stream = new FileStream(path, FileMode.CreateNew, FileAccess.Write);
        using (var writer = new Utf8JsonWriter(stream, Options))
        {
            document.WriteTo(writer);
        }

        stream.WriteByte((byte)'\n');
    }
}
