using System.Text;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>
/// A text file of the data folder, read once through to see that it is whole and UTF-8. A file whose name ends in <c>.gz</c>
/// is unpacked as it is read (<see cref="UnpackedStream"/>).
/// </summary>
internal sealed class TextInput : IDisposable
{
    private const int BufferBytes = 1 << 16;

    private readonly Stream file;

    private TextInput(Stream file, string name)
    {
        this.file = file;
        Name = name;
        Lines = Utf8Text.Require(StartBytes(), name);
    }

    /// <summary>The file as the recipe names it.</summary>
    public string Name { get; }

    /// <summary>The number of lines up to the last that holds anything.</summary>
    public int Lines { get; }

    /// <summary>How much of the file was read since <see cref="Start"/>, 0 to 1.</summary>
    public double Share => (double)file.Position / file.Length;

    /// <summary>Opens a text.</summary>
    /// <exception cref="RefusedException">It is not UTF-8, or a packed file that is damaged.</exception>
    public static TextInput Open(StepContext context, string name) => new(context.OpenInput(name), name);

    /// <summary>The text from its beginning; what was started before must not be read further.</summary>
    public StreamReader Start() => new(StartBytes(), Encoding.UTF8, bufferSize: BufferBytes, leaveOpen: true);

    /// <summary>The ending of a file's name in lower case, that of the text within where it is packed: <c>.csv</c> for <c>a.csv.gz</c>.</summary>
    public static string EndingOf(string name) => Path.GetExtension(WithoutGz(name)).ToLowerInvariant();

    /// <summary>The name of a file without folder and endings: <c>a</c> for <c>rain/a.csv.gz</c>.</summary>
    public static string StemOf(string name) => Path.GetFileNameWithoutExtension(WithoutGz(name));

    /// <inheritdoc/>
    public void Dispose() => file.Dispose();

    private Stream StartBytes()
    {
        file.Position = 0;
        return IsPacked(Name) ? new UnpackedStream(file, Name) : file;
    }

    private static bool IsPacked(string name) => name.EndsWith(".gz", StringComparison.OrdinalIgnoreCase);

    private static string WithoutGz(string name) => IsPacked(name) ? name[..^3] : name;
}
