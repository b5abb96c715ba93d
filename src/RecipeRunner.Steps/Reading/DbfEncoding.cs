using System.Text;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Finds the text encoding of an attribute file: what its <c>.cpg</c> says, else its language byte, else UTF-8 where all
/// of it is valid UTF-8, else Windows-1252 (common practice, no source).
/// </summary>
internal static class DbfEncoding
{
    private const int LanguageByte = 29;

    private static readonly Dictionary<byte, int> Languages = new()
    {
        [0x01] = 437,
        [0x02] = 850,
        [0x13] = 932,
        [0x26] = 866,
        [0x4D] = 936,
        [0x4E] = 949,
        [0x4F] = 950,
        [0x03] = 1252,
        [0x57] = 1252,
        [0x58] = 1252,
        [0x59] = 1252,
        [0x64] = 852,
        [0x65] = 866,
        [0x6B] = 857,
        [0x7A] = 936,
        [0x7B] = 932,
        [0x87] = 852,
        [0x88] = 857,
        [0xC8] = 1250,
        [0xC9] = 1251,
        [0xCA] = 1254,
        [0xCB] = 1253,
    };

    /// <summary>The encoding.</summary>
    /// <param name="context">Takes the finding about a guess.</param>
    /// <param name="name">The shapefile.</param>
    /// <param name="dbf">Its attribute file.</param>
    /// <param name="cpg">The text of its <c>.cpg</c>; null where there is none.</param>
    /// <exception cref="RefusedException">The <c>.cpg</c> names no known encoding, or the text does not fit UTF-8 that it names.</exception>
    public static Encoding Find(StepContext context, string name, byte[] dbf, string? cpg)
    {
        Encoding.RegisterProvider(CodePagesEncodingProvider.Instance);
        if (cpg is not null)
        {
            return Stated(name, dbf, cpg.Trim('\uFEFF', ' ', '\r', '\n', '\t', '\0'));
        }

        var language = dbf[LanguageByte];
        return language == 0 ? Guessed(context, name, dbf) : ByLanguage(name, language);
    }

    private static Encoding ByLanguage(string name, byte language) =>
        Languages.TryGetValue(language, out var page)
            ? Encoding.GetEncoding(page)
            : throw new RefusedException(
                Finding.Error(
                    "RR0219",
                    new Place(name[..^3] + "dbf"),
                    FormattableString.Invariant(
                        $"Its header names the language 0x{language:X2}, whose encoding is not known."
                    ),
                    "Write the encoding into a .cpg file beside it, such as UTF-8 or 1252."
                )
            );

    private static Encoding Guessed(StepContext context, string name, byte[] dbf)
    {
        if (System.Text.Unicode.Utf8.IsValid(Rows(dbf)))
        {
            return Encoding.UTF8;
        }

        context.Find(
            Finding.Notice(
                "RR0218",
                new Place(name[..^3] + "dbf"),
                "It does not say its text encoding and is not UTF-8, so it was read as Windows-1252.",
                "Check the names; write the true encoding into a .cpg file beside it."
            )
        );
        return Encoding.GetEncoding(1252);
    }

    private static Encoding Stated(string name, byte[] dbf, string label)
    {
        var encoding =
            Named(label)
            ?? throw new RefusedException(
                Finding.Error(
                    "RR0215",
                    new Place(name[..^3] + "cpg"),
                    $"It names the encoding '{label}', which is not known.",
                    $"{NearWords.Mend(label, ["UTF-8", "1252", "ISO-8859-1"])} Write UTF-8 or the number of a code page, such as 1252.".TrimStart()
                )
            );
        if (encoding is UTF8Encoding && !System.Text.Unicode.Utf8.IsValid(Rows(dbf)))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0216",
                    new Place(name[..^3] + "dbf"),
                    "Its .cpg says UTF-8, but the text is not.",
                    "Write the true encoding into the .cpg; 1252 is common."
                )
            );
        }

        return encoding;
    }

    private static Encoding? Named(string label)
    {
        var plain = Plain(label.ToLowerInvariant().Replace('_', '-').Replace(' ', '-'));
        return Encoding
            .GetEncodings()
            .Concat(CodePagesEncodingProvider.Instance.GetEncodings())
            .FirstOrDefault(info =>
                string.Equals(info.Name, plain, StringComparison.OrdinalIgnoreCase)
                || string.Equals(FormattableString.Invariant($"{info.CodePage}"), plain, StringComparison.Ordinal)
            )
            ?.GetEncoding();
    }

    /// <summary>The registered name or code page number of the ways in which files spell an encoding (common practice, no source).</summary>
    private static string Plain(string label) =>
        label switch
        {
            "utf8" => "utf-8",
            _ when label.Contains("8859", StringComparison.Ordinal) => "iso-8859-"
                + label[(label.IndexOf("8859", StringComparison.Ordinal) + 4)..].TrimStart('-'),
            _ when label.StartsWith("ansi-", StringComparison.Ordinal) => label["ansi-".Length..],
            _ when label.StartsWith("cp", StringComparison.Ordinal) => label["cp".Length..].TrimStart('-'),
            _ => label,
        };

    private static ReadOnlySpan<byte> Rows(byte[] dbf) =>
        dbf.AsSpan(System.Buffers.Binary.BinaryPrimitives.ReadUInt16LittleEndian(dbf.AsSpan(8)));
}
