using System.Text;
using Spectre.Console;

namespace RecipeRunner.Cli.Printing;

/// <summary>
/// The terminal: plain lines, colour only where it carries meaning and only in a terminal without NO_COLOR. Control and
/// bidirectional characters in what is printed are shown as a blot, so that data cannot steer the terminal.
/// </summary>
internal sealed class Screen
{
    private readonly IAnsiConsole output = Open(System.Console.Out, System.Console.IsOutputRedirected);
    private readonly IAnsiConsole errors = Open(System.Console.Error, System.Console.IsErrorRedirected);
    private bool statusShown;

    /// <summary>True where a person watches the output.</summary>
    public bool IsWatched { get; } = !System.Console.IsOutputRedirected;

    /// <summary>A line of output.</summary>
    public void Line(string text = "") => Write(output, text, Style.Plain);

    /// <summary>A line of output that opens with a word in colour.</summary>
    public void Line(string word, Color colour, string text)
    {
        ClearStatus();
        output.Write(new Text(Plain(word), new Style(colour)));
        output.Write(new Text(Plain(text) + "\n"));
    }

    /// <summary>A line for the error stream.</summary>
    public void Error(string text) => Write(errors, text, Style.Plain);

    /// <summary>A line for the error stream in colour.</summary>
    public void Error(string text, Color colour) => Write(errors, text, new Style(colour));

    /// <summary>A line that the next one writes over; only where a person watches.</summary>
    public void Status(string text)
    {
        if (IsWatched)
        {
            System.Console.Out.Write("\r\u001b[2K" + Plain(text));
            statusShown = true;
        }
    }

    /// <summary>Takes the passing line away.</summary>
    public void ClearStatus()
    {
        if (statusShown)
        {
            System.Console.Out.Write("\r\u001b[2K");
            statusShown = false;
        }
    }

    private void Write(IAnsiConsole console, string text, Style style)
    {
        ClearStatus();
        console.Write(new Text(Plain(text) + "\n", style));
    }

    private static string Plain(string text)
    {
        var plain = new StringBuilder(text.Length);
        foreach (var letter in text)
        {
            var steers =
                (char.IsControl(letter) && letter != '\n')
                || letter is (>= '\u202A' and <= '\u202E') or (>= '\u2066' and <= '\u2069') or '\u200E' or '\u200F';
            plain.Append(steers ? '\uFFFD' : letter);
        }

        return plain.ToString();
    }

    private static IAnsiConsole Open(TextWriter writer, bool redirected)
    {
        var plain = redirected || !string.IsNullOrEmpty(Environment.GetEnvironmentVariable("NO_COLOR"));
        var console = AnsiConsole.Create(
            new AnsiConsoleSettings
            {
                Ansi = redirected ? AnsiSupport.No : AnsiSupport.Detect,
                ColorSystem = plain ? ColorSystemSupport.NoColors : ColorSystemSupport.Detect,
                Out = new AnsiConsoleOutput(writer),
            }
        );
        if (redirected)
        {
            console.Profile.Width = int.MaxValue / 2;
        }

        return console;
    }
}
