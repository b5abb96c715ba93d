using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Looks into a data file and says what is in it, so that a recipe can be written for it.</summary>
public static class Peek
{
    /// <summary>What is in a file.</summary>
    /// <param name="path">The file: a shapefile, GeoJSON, a table of gauges or records, or GHCN-Daily; tables also packed (.gz).</param>
    /// <param name="cancellation">Stops the look.</param>
    /// <returns>What each line is about, and the line.</returns>
    /// <exception cref="RefusedException">There is no such file, or it is damaged or of another kind.</exception>
    public static IEnumerable<(string Name, string Text)> At(string path, CancellationToken cancellation)
    {
        if (!File.Exists(path))
        {
            throw new RefusedException(
                Finding.Error("RR0120", new Place(path), "There is no such file.", "Check the path.")
            );
        }

        var context = new PeekContext(Path.GetDirectoryName(Path.GetFullPath(path))!, cancellation);
        var name = Path.GetFileName(path);
        var isTable = TextInput.EndingOf(name) is ".csv" or ".txt" or ".tsv" or ".dly";
        var lines = isTable ? TablePeek.Of(context, name) : LayerPeek.Of(context, name);
        return lines.Concat(context.Findings.Select(FindingLine));
    }

    private static (string Name, string Text) FindingLine(Finding finding) =>
        (finding.Severity == Severity.Caution ? "caution" : "notice", $"{finding.What} {finding.Mend}".TrimEnd());
}
