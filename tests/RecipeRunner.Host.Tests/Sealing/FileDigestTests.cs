using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Sealing;

/// <summary>Files are digested with SHA-256.</summary>
public sealed class FileDigestTests : IDisposable
{
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    /// <summary>source: FIPS 180-4, the standard's SHA-256 examples of one and of two blocks (NIST, Examples with Intermediate Values).</summary>
    [Theory]
    [InlineData("abc", "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad")]
    [InlineData(
        "abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq",
        "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1"
    )]
    public void The_standards_examples_have_the_standards_digests(string text, string digest)
    {
        bench.Write("message", text);

        var record = FileDigest.Of(bench.Folder, "message");

        record.Sha256.ShouldBe(digest);
        record.Bytes.ShouldBe(text.Length);
    }
}
