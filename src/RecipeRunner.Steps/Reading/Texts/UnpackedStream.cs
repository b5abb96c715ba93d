using System.Globalization;
using System.IO.Compression;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>
/// Unpacks gzip (RFC 1952), one member or several, forward only. Damage is refused, and so is a file that swells beyond
/// reason: past 256 MB to more than 500 times its packed size, which no record of rain does.
/// </summary>
internal sealed class UnpackedStream : ForwardStream
{
    private const long FreeBytes = 256L << 20;
    private const int MostTimes = 500;

    private readonly Stream packed;
    private readonly GZipStream unpacker;
    private readonly string name;
    private readonly byte[] block = new byte[1 << 16];
    private int start;
    private int filled;
    private long total;

    /// <summary>Unpacks a file.</summary>
    /// <param name="packed">The packed file at its beginning; it stays open.</param>
    /// <param name="name">The file as the recipe names it.</param>
    public UnpackedStream(Stream packed, string name)
    {
        this.packed = packed;
        this.name = name;
        unpacker = new GZipStream(new MarkedEnd(packed), CompressionMode.Decompress);
    }

    /// <inheritdoc/>
    public override int Read(Span<byte> buffer)
    {
        if (filled - start <= MarkedEnd.Mark.Length)
        {
            Fill();
        }

        var ready = block.AsSpan(start, filled - start - MarkedEnd.Mark.Length);
        ready = ready[..Math.Min(ready.Length, buffer.Length)];
        ready.CopyTo(buffer);
        start += ready.Length;
        return ready.Length;
    }

    /// <inheritdoc/>
    protected override void Dispose(bool disposing)
    {
        if (disposing)
        {
            unpacker.Dispose();
        }

        base.Dispose(disposing);
    }

    /// <summary>Unpacks a block after what is held back, which at the end must be the mark alone.</summary>
    private void Fill()
    {
        var kept = filled - start;
        block.AsSpan(start, kept).CopyTo(block);
        var read = Unpack(block.AsSpan(kept));
        (start, filled, total) = (0, kept + read, total + read);
        if (filled < block.Length && !block.AsSpan(0, filled).EndsWith(MarkedEnd.Mark))
        {
            throw Damaged();
        }

        if (total > FreeBytes && total / MostTimes > packed.Length)
        {
            throw TooLarge();
        }
    }

    private int Unpack(Span<byte> room)
    {
        try
        {
            return unpacker.ReadAtLeast(room, room.Length, throwOnEndOfStream: false);
        }
        catch (InvalidDataException)
        {
            throw Damaged();
        }
    }

    private RefusedException TooLarge() =>
        new(
            Finding.Error(
                "RR0208",
                new Place(name),
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"It unpacks to more than {MostTimes} times its {packed.Length:N0} bytes; a record of rain does not."
                ),
                "Unpack the file yourself and look at what is in it."
            )
        );

    private RefusedException Damaged() =>
        new(
            Finding.Error(
                "RR0207",
                new Place(name),
                "The packed file is damaged or cut short.",
                "Was it copied whole? Fetch it again, or check it with   gzip -t"
            )
        );
}
