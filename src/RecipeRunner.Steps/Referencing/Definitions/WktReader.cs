using System.Globalization;
using System.Text;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Reads well-known text (OGC 01-009) into nodes. Square or round brackets, any case, any white space and a byte-order
/// mark are taken; anything unfinished, unbalanced, nested too deep or too long is refused, always in one pass.
/// </summary>
internal sealed class WktReader
{
    /// <summary>The longest text that is looked at; real definitions have under 4,000 characters.</summary>
    public const int LongestText = 20_000;

    private const int DeepestNesting = 12;
    private const string Mend =
        "Ask the source of the data for the complete file, or say the system in the recipe: crs: Crs(\"EPSG:…\")";

    private readonly string text;
    private readonly string file;
    private int at;

    private WktReader(string text, string file)
    {
        this.text = text;
        this.file = file;
    }

    /// <summary>Reads a text that holds one node, which ESRI's software may follow by a vertical system.</summary>
    /// <param name="text">The whole text.</param>
    /// <param name="file">The file, for messages.</param>
    /// <exception cref="RefusedException">The text is no complete well-known text.</exception>
    public static WktNode Read(string text, string file)
    {
        if (text.Length > LongestText)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0310",
                    new Place(file),
                    FormattableString.Invariant(
                        $"The definition has {text.Length:N0} characters; no reference system needs more than {LongestText:N0}."
                    ),
                    Mend
                )
            );
        }

        return new WktReader(text.Trim('\uFEFF', '\0', ' ', '\t', '\r', '\n'), file).ReadAll();
    }

    private WktNode ReadAll()
    {
        var root = ReadNode(ReadWord(), 1);
        if (Take(','))
        {
            var word = ReadWord();
            if (word != "VERTCS")
            {
                throw Broken($"{word} follows the definition");
            }

            ReadNode(word, 1);
        }

        SkipSpace();
        return at == text.Length ? root : throw Broken("there is text after its last bracket");
    }

    private WktNode ReadNode(string keyword, int depth)
    {
        if (depth > DeepestNesting)
        {
            throw Broken("its brackets nest too deep");
        }

        var close = Take('[') ? ']' : ')';
        if (close == ')' && !Take('('))
        {
            throw Broken($"a bracket is missing after {keyword}");
        }

        var texts = new List<string>();
        var numbers = new List<double>();
        var children = new List<WktNode>();
        do
        {
            SkipSpace();
            var next = Peek();
            if (next == '"')
            {
                texts.Add(ReadQuoted());
            }
            else if (char.IsAsciiLetter(next))
            {
                var word = ReadWord();
                if (Peek() is '[' or '(')
                {
                    children.Add(ReadNode(word, depth + 1));
                }
                else
                {
                    texts.Add(word);
                }
            }
            else
            {
                numbers.Add(ReadNumber());
            }
        } while (Take(','));

        return Take(close)
            ? new WktNode(keyword, texts, numbers, children)
            : throw Broken($"the bracket of {keyword} is not closed");
    }

    private string ReadWord()
    {
        SkipSpace();
        var start = at;
        while (char.IsAsciiLetterOrDigit(Peek()) || Peek() == '_')
        {
            at++;
        }

        if (at == start)
        {
            throw Broken("a word is missing");
        }

        var word = text[start..at].ToUpperInvariant();
        SkipSpace();
        return word;
    }

    private string ReadQuoted()
    {
        var read = new StringBuilder();
        for (at++; at < text.Length; at++)
        {
            if (text[at] != '"')
            {
                read.Append(text[at]);
            }
            else if (at + 1 < text.Length && text[at + 1] == '"')
            {
                read.Append('"');
                at++;
            }
            else
            {
                at++;
                return read.ToString();
            }
        }

        throw Broken("a quotation mark is not closed");
    }

    private double ReadNumber()
    {
        var start = at;
        while (char.IsAsciiLetterOrDigit(Peek()) || Peek() is '+' or '-' or '.')
        {
            at++;
        }

        var read = text.AsSpan(start, at - start);
        return
            double.TryParse(read, NumberStyles.Float, CultureInfo.InvariantCulture, out var number)
            && double.IsFinite(number)
            ? number
            : throw Broken($"\"{read}\" stands where a number or a text is expected");
    }

    private bool Take(char expected)
    {
        SkipSpace();
        if (Peek() != expected)
        {
            return false;
        }

        at++;
        return true;
    }

    private char Peek() => at < text.Length ? text[at] : '\0';

    private void SkipSpace()
    {
        while (char.IsWhiteSpace(Peek()))
        {
            at++;
        }
    }

    private RefusedException Broken(string how) =>
        new(
            Finding.Error(
                "RR0310",
                new Place(file),
                FormattableString.Invariant(
                    $"The definition of the reference system cannot be read: at character {at + 1} {how}. It may be cut off."
                ),
                Mend
            )
        );
}
