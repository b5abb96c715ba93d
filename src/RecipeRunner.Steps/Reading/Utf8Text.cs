using System.Text.Unicode;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Checks the encoding of text files.</summary>
internal static class Utf8Text
{
    private const int BlockBytes = 1 << 16;

    /// <summary>Refuses a text that is not UTF-8 (RFC 3629), naming the line. The stream then stands at its beginning again.</summary>
    /// <exception cref="RefusedException">It is not UTF-8.</exception>
    public static void Require(Stream stream, string name)
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
