using System.Text;
using RecipeRunner.EndToEnd.Tests.Running;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>Whatever is changed in a sealed study is found, and the file is named.</summary>
public sealed class TamperTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    private const int PlacesAFile = 25;

    private string[] Files =>
        [
            .. Directory
                .EnumerateFiles(demo.Folder, "*", SearchOption.AllDirectories)
                .Select(path => Path.GetRelativePath(demo.Folder, path))
                .Order(StringComparer.Ordinal),
        ];

    [Fact]
    public void Every_change_of_a_byte_is_found_and_located()
    {
        var cases = 0;
        foreach (var file in Files)
        {
            var path = Path.Combine(demo.Folder, file);
            var was = File.ReadAllBytes(path);
            foreach (var now in Changes(was))
            {
                File.WriteAllBytes(path, now);
                Found(file).ShouldBeTrue($"a change of {file} was not found");
                cases++;
            }

            File.WriteAllBytes(path, was);
        }

        Problems().ShouldBeEmpty();
        cases.ShouldBeGreaterThan(1_000);
    }

    [Fact]
    public void A_file_that_is_gone_renamed_or_new_is_found()
    {
        foreach (var file in Files)
        {
            var path = Path.Combine(demo.Folder, file);
            File.Move(path, path + ".away");
            Found(file).ShouldBeTrue($"{file} was renamed");
            var away = demo.Tool.PathOf("away");
            File.Move(path + ".away", away);
            Found(file).ShouldBeTrue($"{file} is gone");
            File.Move(away, path);
            File.WriteAllText(path + "x", "");
            Found(file + "x").ShouldBeTrue($"a file lies beside {file}");
            File.Delete(path + "x");
        }

        Problems().ShouldBeEmpty();
    }

    [Fact]
    public void Two_files_that_changed_places_are_found()
    {
        var files = Files.Where(file => file.StartsWith("data/", StringComparison.Ordinal)).ToArray();
        foreach (var (one, other) in files.Zip(files.Skip(1)).Where(pair => !Same(pair.First, pair.Second)))
        {
            Swap(one, other);
            Found(one).ShouldBeTrue(one);
            Found(other).ShouldBeTrue(other);
            Swap(one, other);
        }

        Problems().ShouldBeEmpty();
    }

    /// <summary>Links, and a folder in a file's place: nothing that a digest could be taken of.</summary>
    [Fact]
    public void What_is_no_file_is_found()
    {
        var path = demo.PathOf("audit.json");
        var away = demo.Tool.PathOf("audit.json");
        File.Move(path, away);
        File.CreateSymbolicLink(path, away);
        Found("data/audit.json").ShouldBeTrue("a link");
        File.Delete(path);
        Directory.CreateDirectory(path);
        Found("data/audit.json").ShouldBeTrue("a folder");
        Directory.Delete(path);
        File.Move(away, path);
        Problems().ShouldBeEmpty();
    }

    /// <summary>A forger raises the last digit of a file (behind some text) and edits all that lists it: only a rerun tells.</summary>
    [Theory]
    [InlineData("data/tables/areal-rainfall.csv", "", "DIFFERS")]
    [InlineData("data/tables/weights.csv", "", "DIFFERS")]
    [InlineData("data/layers/gauges.dbf", "", "DIFFERS")]
    [InlineData("data/inputs/daily.csv", "", "CANNOT RERUN")]
    [InlineData("data/summary.html", "", "DIFFERS")]
    [InlineData("data/audit.schema.json", "", "DIFFERS")]
    [InlineData("data/ro-crate-metadata.json", "", "DIFFERS")]
    [InlineData("data/recipe/monthly-totals.csx", "", "CANNOT RERUN")]
    [InlineData("data/audit.json", "bytes\":", "CANNOT RERUN")]
    [InlineData("bag-info.txt", "", "CANNOT RERUN")]
    [InlineData("bagit.txt", "", "CANNOT RERUN")]
    public void An_edit_with_manifests_to_match_is_found_by_a_rerun(string file, string behind, string verdict)
    {
        using var forger = new Tool();
        var study = forger.PathOf("forged.study");
        forger.Command("cp", "-r", demo.Folder, study).ExitCode.ShouldBe(0);
        var path = Path.Combine(study, file);
        var bytes = File.ReadAllBytes(path);
        var at = Enumerable
            .Range(behind.Length, bytes.Length - behind.Length)
            .Last(i =>
                bytes[i] is >= (byte)'1' and <= (byte)'8'
                && bytes.AsSpan(i - behind.Length, behind.Length).SequenceEqual(Encoding.UTF8.GetBytes(behind))
            );
        bytes[at]++;
        File.WriteAllBytes(path, bytes);
        Reseal(forger, study);

        var said = forger.Run("rerun", "forged.study");

        said.Output.ShouldStartWith(verdict, customMessage: said.Output + said.Errors);
        said.ExitCode.ShouldNotBe(0);
        said.Output.ShouldContain(Path.GetFileName(file));
    }

    /// <summary>Bytes flipped, put in, taken out, cut off and added, at the ends and at places between.</summary>
    private static IEnumerable<byte[]> Changes(byte[] was)
    {
        yield return [.. was, (byte)'\n'];
        if (was.Length == 0)
        {
            yield break;
        }

        yield return [(byte)' ', .. was];
        yield return [.. Encoding.UTF8.Preamble, .. was];
        yield return was[1..];
        yield return was[..^1];
        foreach (
            var place in Enumerable
                .Range(0, PlacesAFile)
                .Select(i => (int)((long)(was.Length - 1) * i / (PlacesAFile - 1)))
                .Distinct()
        )
        {
            byte[] now = [.. was];
            now[place] ^= (byte)(1 << (place % 8));
            yield return now;
        }
    }

    /// <summary>A file that does not fit its manifest is named, and so is the manifest: either may have been changed.</summary>
    private bool Found(string file) =>
        Problems()
            .Any(problem =>
                string.Equals(problem.Where.File, file, StringComparison.Ordinal)
                || problem.What.StartsWith(
                    $"Its bytes have changed since it was sealed: {file} ",
                    StringComparison.Ordinal
                )
                || problem.What.StartsWith($"{file} ", StringComparison.Ordinal)
            );

    private IReadOnlyList<Finding> Problems() => Host.Sealing.SealCheck.Of(demo.Folder, CancellationToken.None);

    private bool Same(string one, string other) =>
        File.ReadAllBytes(Path.Combine(demo.Folder, one))
            .SequenceEqual(File.ReadAllBytes(Path.Combine(demo.Folder, other)));

    private void Swap(string one, string other)
    {
        var (first, second) = (Path.Combine(demo.Folder, one), Path.Combine(demo.Folder, other));
        var away = demo.Tool.PathOf("away");
        File.Move(first, away);
        File.Move(second, first);
        File.Move(away, second);
    }

    /// <summary>Writes the manifests anew with coreutils, as a forger would.</summary>
    private static void Reseal(Tool forger, string study)
    {
        const string Manifests =
            "export LC_ALL=C; find data -type f | sort | xargs -d '\\n' sha256sum > manifest-sha256.txt && sha256sum bag-info.txt bagit.txt manifest-sha256.txt > tagmanifest-sha256.txt";
        forger.Command("bash", "-c", $"cd '{study}' && {Manifests}").ExitCode.ShouldBe(0);
    }
}
