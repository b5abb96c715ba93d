using System.Reflection;

namespace RecipeRunner.Host.Summarising;

/// <summary>What every page begins and ends with: self-contained, without script, one style.</summary>
internal static class PageFrame
{
    /// <summary>Begins a page.</summary>
    /// <param name="title">What the browser shows as its title.</param>
    public static Html Open(string title)
    {
        var page = new Html();
        return page.Raw("<!DOCTYPE html>")
            .Raw(
                "<html lang=\"en\"><head><meta charset=\"utf-8\"><meta name=\"viewport\" content=\"width=device-width\">"
            )
            .Element("title", title)
            .Raw($"<style>{Style()}</style></head><body><main>");
    }

    /// <summary>Ends a page and gives its markup.</summary>
    public static string Close(Html page) => page.Raw("</main></body></html>").ToString();

    private static string Style()
    {
        using var stream = Assembly
            .GetExecutingAssembly()
            .GetManifestResourceStream("RecipeRunner.Host.Summarising.summary.css")!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
