using System.Text.Unicode;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>Checks the encoding of text files.</summary>
internal static class Utf8Text
{
    private const int BlockBytes = 1 << 16;

    /// <summary>Refuses a text that is not UTF-8 (RFC 3629), naming the line.</summary>
    /// <param name="stream">The text, read to its end.</param>
    /// <param name="name">The file.</param>
    /// <returns>The number of lines up to the last that holds anything.</returns>
    /// <exception cref="RefusedException">It is not UTF-8.</exception>
    public static int Require(Stream stream, string name)
    {
        var block = new byte[BlockBytes];
        var (kept, line, lastLine) = (0, 1, 0);
        for (var more = true; more; )
        {
            var read = stream.ReadAtLeast(block.AsSpan(kept), block.Length - kept, throwOnEndOfStream: false);
            var filled = kept + read;
            more = filled == block.Length;
            var good = more ? WholeCharacters(block, filled) : filled;
            var text = block.AsSpan(0, good);
            if (!Utf8.IsValid(text))
            {
                throw NotUtf8(name, LineOfFault(text, line));
            }

            if (text.LastIndexOfAnyExcept((byte)'\n', (byte)'\r') is >= 0 and var last)
            {
                lastLine = line + text[..last].Count((byte)'\n');
            }

            line += text.Count((byte)'\n');
            kept = filled - good;
            block.AsSpan(good, kept).CopyTo(block);
        }

        return lastLine;
    }

    private static RefusedException NotUtf8(string name, int line) =>
        new(
            Finding.Error(
                "RR0204",
                new Place(name, line),
                "The text is not UTF-8.",
                "Save the file as UTF-8; text from older programs is often in Windows-1252."
            )
        );

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
