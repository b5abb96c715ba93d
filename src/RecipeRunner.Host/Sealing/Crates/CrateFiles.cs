using System.Text.Json.Nodes;
using RecipeRunner.Host.Running;
using static RecipeRunner.Host.Sealing.Crates.CrateEntity;

namespace RecipeRunner.Host.Sealing.Crates;

/// <summary>
/// The files of a study as entities: those that it holds are data entities, inputs that it only lists are described without being
/// parts. (RO-Crate 1.1, "Data Entities".)
/// </summary>
internal static class CrateFiles
{
    /// <summary>Where an input is described: as the file that the study holds, or as one that lies elsewhere.</summary>
    public static string IdOfInput(FileRecord input) => input.IsHeld ? IdOf(input.Path) : LocalId("listed", input.Name);

    /// <summary>An input file, with what the recipe states of its source.</summary>
    public static JsonObject Input(FileRecord input, StudyRecord record)
    {
        var entity = input.IsHeld ? File(input) : Digested(Entity(IdOfInput(input), input.Name, "CreativeWork"), input);
        entity["exampleOfWork"] = To(LocalId("input", input.Name));
        var sources = record
            .Sources.Where(source => source.Inputs.Contains(input.Path, StringComparer.Ordinal))
            .ToArray();
        if (sources.Length > 0)
        {
            entity["description"] = string.Join(" ", sources.Select(source => $"Source: {source.Text}"));
        }

        var licences = sources.Select(source => source.Licence).OfType<string>().Distinct(StringComparer.Ordinal);
        if (licences.Select(CrateLicences.IdOf).ToArray() is { Length: > 0 } ids)
        {
            entity["license"] = ids.Length == 1 ? To(ids[0]) : ToAll(ids);
        }

        return entity;
    }

    /// <summary>A layer or table.</summary>
    public static JsonObject Output(FileRecord output)
    {
        var entity = File(output);
        entity["exampleOfWork"] = To(LocalId("output", output.Path));
        return entity;
    }

    /// <summary>A file that tells of the run.</summary>
    public static JsonObject Telling(FileRecord file)
    {
        var entity = File(file);
        entity["about"] = To(Crate.Run);
        return entity;
    }

    /// <summary>The run's own circumstances, without a digest: it would change with the clock.</summary>
    public static JsonObject Circumstances()
    {
        var entity = Entity("run.json", "run.json", "File");
        entity["encodingFormat"] = FormatOf("run.json");
        entity["about"] = To(Crate.Run);
        return entity;
    }

    /// <summary>A file with its size and digest.</summary>
    public static JsonObject File(FileRecord file, params string[] moreTypes) =>
        Digested(Entity(IdOf(file.Path), file.Path, ["File", .. moreTypes]), file);

    private static JsonObject Digested(JsonObject entity, FileRecord file)
    {
        entity["contentSize"] = FormattableString.Invariant($"{file.Bytes}");
        entity["encodingFormat"] = FormatOf(file.Path);
        entity["sha256"] = file.Sha256;
        return entity;
    }

    /// <summary>Media types of the IANA registry; for the parts of shapefiles those that it registered for them.</summary>
    private static string FormatOf(string path) =>
        Path.GetExtension(path) switch
        {
            ".csv" => "text/csv",
            ".json" => "application/json",
            ".geojson" => "application/geo+json",
            ".html" => "text/html",
            ".gz" => "application/gzip",
            ".shp" => "application/vnd.shp",
            ".shx" => "application/vnd.shx",
            ".dbf" => "application/vnd.dbf",
            ".csx" or ".txt" or ".prj" or ".cpg" or ".dly" => "text/plain",
            _ => "application/octet-stream",
        };
}
