namespace RecipeRunner.Testing;

/// <summary>Where the outside reference data of this repository lie.</summary>
public static class ReferenceFolder
{
    /// <summary>The path of a reference file, such as <c>sic97/stations.csv</c>.</summary>
    /// <param name="relative">The path below tests/reference, with forward slashes.</param>
    /// <exception cref="FileNotFoundException">There is no such file or folder above the running tests.</exception>
    public static string PathOf(string relative)
    {
        for (var folder = new DirectoryInfo(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            var path = Path.Combine(folder.FullName, "tests", "reference", relative);
            if (File.Exists(path) || Directory.Exists(path))
            {
                return path;
            }
        }

        throw new FileNotFoundException($"tests/reference/{relative} was not found above the running tests.");
    }
}
