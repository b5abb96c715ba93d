using System.Security.Cryptography;
using System.Text.Json;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Host.Summarising;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Sealing;

/// <summary>A study is a valid bag (RFC 8493), and equal runs give equal bytes.</summary>
public sealed class SealTests : IDisposable
{
    private const string Recipe =
        "Title(\"A & <b>\");\nNote(\"=1+1\");\nvar a = Read(\"a.txt\").Join(Read(\"b.txt\"));\nWrite(a, \"tables/ab.txt\");\n";
    private readonly Workbench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void The_bag_names_every_file_with_its_digest()
    {
        var outcome = bench.Run(Recipe);

        File.ReadAllText(Path.Combine(bench.Study, "bagit.txt"))
            .ShouldBe("BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n");
        var payload = Verify("manifest-sha256.txt");
        var tags = Verify("tagmanifest-sha256.txt");
        payload.ShouldBe(
            Directory
                .EnumerateFiles(Path.Combine(bench.Study, "data"), "*", SearchOption.AllDirectories)
                .Select(Relative),
            ignoreOrder: true
        );
        tags.ShouldBe(["bag-info.txt", "bagit.txt", "manifest-sha256.txt"]);
        outcome.FileCount.ShouldBe(payload.Length + tags.Length + 1);
    }

    [Fact]
    public void Two_runs_give_the_same_bytes_but_for_the_runs_own_circumstances()
    {
        bench.Run(Recipe);
        var other = Path.Combine(bench.Folder, "other.study");
        bench.Run(Recipe, into: other);

        string[] ofTheRun =
        [
            "bag-info.txt",
            "data/ro-crate-metadata.json",
            "data/run.json",
            "manifest-sha256.txt",
            "tagmanifest-sha256.txt",
        ];
        var files = Directory.EnumerateFiles(bench.Study, "*", SearchOption.AllDirectories).Select(Relative).ToArray();
        files.Length.ShouldBeGreaterThan(9);
        files
            .Except(ofTheRun)
            .ShouldAllBe(file =>
                File.ReadAllBytes(Path.Combine(bench.Study, file))
                    .SequenceEqual(File.ReadAllBytes(Path.Combine(other, file)))
            );
    }

    [Fact]
    public void The_audit_tells_the_journal_and_carries_the_caution()
    {
        bench.Run(Recipe);
        using var audit = JsonDocument.Parse(File.ReadAllBytes(Path.Combine(bench.Study, "data/audit.json")));
        var root = audit.RootElement;

        root.GetProperty("caution").GetString().ShouldBe(Caution.Text);
        root.GetProperty("journal").GetArrayLength().ShouldBe(4);
        root.GetProperty("journal")[2]
            .GetProperty("inputs")[0]
            .GetProperty("sha256")
            .GetString()
            .ShouldBe(root.GetProperty("journal")[0].GetProperty("output").GetProperty("sha256").GetString());
        root.GetProperty("outputs")[0].GetProperty("path").GetString().ShouldBe("tables/ab.txt");
    }

    [Fact]
    public void The_page_carries_caution_and_assumptions_and_escapes_what_it_shows()
    {
        bench.Run(Recipe);
        var page = File.ReadAllText(Path.Combine(bench.Study, "data/summary.html"));

        page.ShouldContain("<h1>A &amp; &lt;b&gt;</h1>");
        page.ShouldNotContain("<b>'");
        page.ShouldContain("licensed professional");
        page.ShouldContain("Words mean what they say.");
        page.ShouldNotContain("<script");
        page.ShouldNotContain("http:");
    }

    [Theory]
    [InlineData("plain-1.5", "--set s=plain-1.5")]
    [InlineData("a b; rm 'x'", "--set &#39;s=a b; rm &#39;\\&#39;&#39;x&#39;\\&#39;&#39;&#39;")]
    public void The_command_to_repeat_a_study_can_be_pasted(string value, string expected)
    {
        bench.Run("Setting(\"s\", \"\");", settings: [("s", value)]);

        File.ReadAllText(Path.Combine(bench.Study, "data/summary.html")).ShouldContain(expected);
    }

    /// <summary>source: RFC 8493, section 2.2.2: Payload-Oxum is OctetCount.StreamCount of the payload.</summary>
    [Fact]
    public void The_bags_info_tells_tool_title_and_the_size_of_the_payload()
    {
        bench.Run("Title(\" two\\nlines \"); Write(Read(\"a.txt\"), \"tables/a.txt\");");
        var payload = Directory
            .EnumerateFiles(Path.Combine(bench.Study, "data"), "*", SearchOption.AllDirectories)
            .Select(path => new FileInfo(path).Length)
            .ToArray();

        File.ReadAllText(Path.Combine(bench.Study, "bag-info.txt"))
            .ShouldBe(
                $"Bag-Software-Agent: Recipe Runner {ToolVersion.Text}\nExternal-Description: two lines\nPayload-Oxum: {payload.Sum()}.{payload.Length}\n"
            );
    }

    private string[] Verify(string manifest) =>
        [
            .. File.ReadAllLines(Path.Combine(bench.Study, manifest))
                .Select(line =>
                {
                    var (digest, path) = (line[..64], line[66..]);
                    Convert
                        .ToHexStringLower(SHA256.HashData(File.ReadAllBytes(Path.Combine(bench.Study, path))))
                        .ShouldBe(digest);
                    return path;
                }),
        ];

    private string Relative(string path) => Path.GetRelativePath(bench.Study, path);
}
