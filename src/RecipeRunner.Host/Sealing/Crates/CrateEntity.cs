using System.Text.Json.Nodes;

namespace RecipeRunner.Host.Sealing.Crates;

/// <summary>Small shapes of JSON-LD from which a crate is put together.</summary>
internal static class CrateEntity
{
    /// <summary>A reference to an entity.</summary>
    public static JsonObject To(string id) => new() { ["@id"] = id };

    /// <summary>References to entities.</summary>
    public static JsonArray ToAll(IEnumerable<string> ids) => new([.. ids.Select(To)]);

    /// <summary>An entity of one or more types.</summary>
    public static JsonObject Entity(string id, string name, params string[] types) =>
        new()
        {
            ["@id"] = id,
            ["@type"] = types.Length == 1 ? types[0] : new JsonArray([.. types.Select(type => JsonValue.Create(type))]),
            ["name"] = name,
        };

    /// <summary>The id of a file: its path from the crate's root, percent-encoded.</summary>
    public static string IdOf(string path) => string.Join('/', path.Split('/').Select(Uri.EscapeDataString));

    /// <summary>The id of an entity that lies in the crate's description alone.</summary>
    public static string LocalId(params string[] parts) => "#" + string.Join('/', parts.Select(Uri.EscapeDataString));
}
