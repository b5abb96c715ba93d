using System.IO.Compression;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>
/// A packed file with one more gzip member after it that holds <see cref="Mark"/>. The platform's unpacker takes a file that
/// was cut for a whole one; of a cut file it never comes to the mark.
/// </summary>
internal sealed class MarkedEnd(Stream packed) : ForwardStream
{
    private static readonly byte[] Member = Pack();
    private int markGiven;

    /// <summary>What stands at the very end; no text holds it.</summary>
    public static ReadOnlySpan<byte> Mark => "\0end of the packed file\0"u8;

    /// <inheritdoc/>
    public override int Read(Span<byte> buffer)
    {
        var read = packed.Read(buffer);
        if (read > 0 || buffer.IsEmpty)
        {
            return read;
        }

        var rest = Member.AsSpan(markGiven);
        rest = rest[..Math.Min(rest.Length, buffer.Length)];
        rest.CopyTo(buffer);
        markGiven += rest.Length;
        return rest.Length;
    }

    private static byte[] Pack()
    {
        using var member = new MemoryStream();
        using (var packer = new GZipStream(member, CompressionLevel.Fastest, leaveOpen: true))
        {
            packer.Write(Mark);
        }

        return member.ToArray();
    }
}
