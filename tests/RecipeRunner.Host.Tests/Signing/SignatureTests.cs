using System.Diagnostics;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Tests.Support;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Signing;

/// <summary>Studies are signed with SSH keys; OpenSSH itself makes the keys and judges the signatures.</summary>
public sealed class SignatureTests : IDisposable
{
    private const string Recipe = "Write(Read(\"a.txt\"), \"tables/a.txt\");";
    private const string Signature = "tagmanifest-sha256.txt.sig";
    private readonly Workbench bench = new();
    private readonly string key;

    public SignatureTests() => key = NewKey("key");

    public void Dispose() => bench.Dispose();

    [Fact]
    public void OpenSSH_accepts_the_signature_and_a_rerun_says_whose_it_is()
    {
        bench
            .Run(Recipe, sign: key)
            .FileCount.ShouldBe(Directory.GetFiles(bench.Study, "*", SearchOption.AllDirectories).Length);
        var signers = Signers("me@example.org");

        var manifest = Path.Combine(bench.Study, "tagmanifest-sha256.txt");
        Shell(
                $"ssh-keygen -Y verify -n recipe-runner -f '{signers}' -I me@example.org -s '{manifest}.sig' < '{manifest}'"
            )
            .ShouldContain("Good \"recipe-runner\" signature for me@example.org");
        var report = bench.Rerun(signers: signers);
        report.Verdict.ShouldBe(Verdict.Identical);
        report.Signer!.KeyType.ShouldBe("ED25519");
        report.Signer.Identity.ShouldBe("me@example.org");
        Shell($"ssh-keygen -l -f '{key}.pub'").ShouldContain(report.Signer.Fingerprint);
        bench.Rerun().Signer.ShouldBe(report.Signer with { Identity = null });
    }

    [Fact]
    public void A_study_needs_no_signature_unless_signers_are_named()
    {
        bench.Run(Recipe);

        bench.Rerun().Signer.ShouldBeNull();
        bench.Rerun().Verdict.ShouldBe(Verdict.Identical);
        Refused(bench.Rerun(signers: Signers("me@example.org"))).ShouldBe("RR0833");
        Refused(bench.Rerun(signers: Path.Combine(bench.Folder, "none"))).ShouldBe("RR0832");
    }

    [Fact]
    public void A_key_that_is_not_on_the_list_is_not_allowed()
    {
        bench.Run(Recipe, sign: NewKey("other"));

        Refused(bench.Rerun(signers: Signers("me@example.org"))).ShouldBe("RR0834");
    }

    [Fact]
    public void A_signature_that_was_changed_or_is_of_another_study_is_refused()
    {
        bench.Run(Recipe, sign: key);
        var path = Path.Combine(bench.Study, Signature);
        var good = File.ReadAllText(path);

        File.WriteAllText(path, Changed(good));
        Refused(bench.Rerun()).ShouldBe("RR0831");
        File.WriteAllText(path, "");
        Refused(bench.Rerun()).ShouldBe("RR0831");
        bench.Run("Write(Read(\"b.txt\"), \"tables/b.txt\");", replace: true);
        File.WriteAllText(path, good);
        Refused(bench.Rerun()).ShouldBe("RR0831");
    }

    [Fact]
    public void A_study_that_was_edited_and_sealed_anew_no_longer_fits_its_signature()
    {
        bench.Run(Recipe, sign: key);
        File.AppendAllText(Path.Combine(bench.Study, "data/run.json"), " ");
        bench.Reseal();

        Refused(bench.Rerun()).ShouldBe("RR0831");
    }

    [Fact]
    public void A_signature_made_for_another_purpose_does_not_count()
    {
        bench.Run(Recipe);
        Shell($"ssh-keygen -Y sign -n file -f '{key}' '{Path.Combine(bench.Study, "tagmanifest-sha256.txt")}'");

        Refused(bench.Rerun()).ShouldBe("RR0831");
    }

    [Fact]
    public void A_key_that_is_not_there_or_is_none_is_refused_before_the_recipe_runs()
    {
        const string Never = "throw new Exception(\"it ran\");";
        Refused(Never, Path.Combine(bench.Folder, "none")).ShouldBe("RR0721");
        Refused(Never, bench.Write("data-folder/no-key", "hello")).ShouldBe("RR0721");
    }

    [Fact]
    public void A_key_whose_passphrase_nobody_can_type_leaves_nothing()
    {
        var locked = NewKey("locked", "secret words");
        var script = bench.Write("data-folder/refuse.sh", "#!/bin/sh\nexit 1\n");
        Shell($"chmod +x '{script}'");
        using var asking = new AskPass(script);

        Refused(Recipe, locked).ShouldBe("RR0722");
        bench.Leftovers().ShouldBeEmpty();
    }

    private static string Changed(string signature)
    {
        var lines = signature.Split('\n');
        var middle = lines[^4];
        lines[^4] = (middle[0] == 'A' ? 'B' : 'A') + middle[1..];
        return string.Join('\n', lines);
    }

    private static string Refused(RerunReport report)
    {
        report.Verdict.ShouldBe(Verdict.CannotRerun);
        return report.Problems.Single().Code;
    }

    private string Refused(string recipe, string with) =>
        Should.Throw<RefusedException>(() => bench.Run(recipe, sign: with)).Problems.Single().Code;

    private string NewKey(string name, string passphrase = "")
    {
        var path = Path.Combine(bench.DataFolder, name);
        Shell($"ssh-keygen -q -t ed25519 -C '' -N '{passphrase}' -f '{path}'");
        return path;
    }

    private string Signers(string name) =>
        bench.Write("data-folder/signers", $"{name} {File.ReadAllText(key + ".pub")}");

    private static string Shell(string command)
    {
        using var process = Process.Start(
            new ProcessStartInfo("bash", ["-c", command])
            {
                UseShellExecute = false,
                RedirectStandardOutput = true,
                RedirectStandardError = true,
            }
        )!;
        var output = process.StandardOutput.ReadToEnd() + process.StandardError.ReadToEnd();
        process.WaitForExit();
        process.ExitCode.ShouldBe(0, output);
        return output;
    }

    /// <summary>Has OpenSSH ask a program for passphrases instead of a terminal, which a test may or may not have.</summary>
    private sealed class AskPass : IDisposable
    {
        public AskPass(string program)
        {
            Environment.SetEnvironmentVariable("SSH_ASKPASS", program);
            Environment.SetEnvironmentVariable("SSH_ASKPASS_REQUIRE", "force");
        }

        public void Dispose()
        {
            Environment.SetEnvironmentVariable("SSH_ASKPASS", null);
            Environment.SetEnvironmentVariable("SSH_ASKPASS_REQUIRE", null);
        }
    }
}
