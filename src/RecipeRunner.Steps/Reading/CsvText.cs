using System.Text.Unicode;
using nietras.SeparatedValues;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Opens a text table (RFC 4180; comma, semicolon, tab or bar, found from the header) and checks that it is UTF-8.</summary>
internal static class CsvText
{
    private const int BlockBytes = 1 << 16;

    /// <summary>Opens the table before its header, which is line 1.</summary>
    /// <exception cref="RefusedException">It is empty, or not UTF-8.</exception>
    public static SepReader Open(Stream stream, string name)
    {
        RequireUtf8(stream, name);
        if (stream.Length == 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0201",
                    new Place(name),
                    "The file is empty.",
                    "Was it copied whole? A table starts with a header line that names its columns."
                )
            );
        }

        return Sep.Reader(options =>
                options with
                {
                    Unescape = true,
                    DisableColCountCheck = true,
                    HasHeader = false,
                    DisableFastFloat = true,
                }
            )
            .From(stream);
    }

    /// <summary>Reads the header: column names without the blanks around them. The reader then stands before the first row.</summary>
    /// <exception cref="RefusedException">Two columns have one name.</exception>
    public static string[] Names(SepReader reader, string name)
    {
        reader.MoveNext();
        var names = reader.Current[..].ToStringsArray().Select(column => column.Trim()).ToArray();
        var twins = names
            .Where(column => column.Length > 0)
            .GroupBy(column => column, StringComparer.Ordinal)
            .Where(group => group.Skip(1).Any())
            .ToArray();
        var problems = new Problems();
        foreach (var twin in twins)
        {
            problems.Add(
                "RR0202",
                new Place(name, 1, Array.LastIndexOf(names, twin.Key) + 1),
                $"The header names the column '{twin.Key}' more than once.",
                "Give each column a name of its own."
            );
        }

        problems.ThrowIfAny();
        return names;
    }

    private static void RequireUtf8(Stream stream, string name)
    {
        var block = new byte[BlockBytes];
        var kept = 0;
        var line = 1;
        for (int read; (read = stream.Read(block, kept, block.Length - kept)) > 0; )
        {
            var filled = kept + read;
            var good = stream.Position == stream.Length ? filled : WholeCharacters(block, filled);
            if (!Utf8.IsValid(block.AsSpan(0, good)))
            {
                throw new RefusedException(
                    Finding.Error(
                        "RR0204",
                        new Place(name, LineOfFault(block.AsSpan(0, good), line)),
                        "The text is not UTF-8.",
                        "Save the file as UTF-8; text from older programs is often in Windows-1252."
                    )
                );
            }

            line += block.AsSpan(0, good).Count((byte)'\n');
            kept = filled - good;
            block.AsSpan(good, kept).CopyTo(block);
        }

        stream.Position = 0;
    }

    /// <summary>The length without a character cut short at the end of a block.</summary>
    private static int WholeCharacters(byte[] block, int filled)
    {
        var start = filled;
        while (start > 0 && filled - start < 3 && (block[start - 1] & 0xC0) == 0x80)
        {
            start--;
        }

        return start > 0 && (block[start - 1] & 0xC0) == 0xC0 ? start - 1 : filled;
    }

    private static int LineOfFault(ReadOnlySpan<byte> block, int line)
    {
        foreach (var range in block.Split((byte)'\n'))
        {
            if (!Utf8.IsValid(block[range]))
            {
                return line;
            }

            line++;
        }

        return line;
    }
}
