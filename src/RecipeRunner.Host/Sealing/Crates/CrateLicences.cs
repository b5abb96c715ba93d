using System.Text.Json.Nodes;
using RecipeRunner.Host.Running;
using static RecipeRunner.Host.Sealing.Crates.CrateEntity;

namespace RecipeRunner.Host.Sealing.Crates;

/// <summary>The licences of a study's data, as its recipe states them, and what can be said of the whole.</summary>
internal static class CrateLicences
{
    private const string OfTheWhole = "#licence-of-the-study";

    /// <summary>The licence of the whole, to which the root points.</summary>
    public static JsonObject Root => To(OfTheWhole);

    /// <summary>The entity of a licence: its own address where it is one, or else one that lies in the crate.</summary>
    public static string IdOf(string licence) =>
        Uri.TryCreate(licence, UriKind.Absolute, out var address) && address.Scheme is "https" or "http"
            ? licence
            : LocalId("licence", licence);

    /// <summary>The licence of the whole and those of the parts.</summary>
    public static IEnumerable<JsonObject> Entities(StudyRecord record)
    {
        var licences = record
            .Sources.Select(source => source.Licence)
            .OfType<string>()
            .Distinct(StringComparer.Ordinal)
            .ToArray();
        var whole = Entity(OfTheWhole, "Licence of the study", "CreativeWork");
        whole["description"] =
            licences.Length == 0
                ? "The recipe states no licence of its data; ask those who made them."
                : $"The recipe states of its data: {string.Join("; ", licences)}. It states no licence of its own or of the results.";
        return licences.Select(licence => Entity(IdOf(licence), licence, "CreativeWork")).Prepend(whole);
    }
}
