using RecipeRunner.EndToEnd.Tests.Running;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>Signing and listing as a person asks for them on the command line.</summary>
public sealed class SignedAndListedTests
{
    [Fact]
    public void A_signed_study_that_lists_its_inputs_reruns_with_its_data_and_names_its_signer()
    {
        using var tool = new Tool();
        tool.Command("ssh-keygen", "-q", "-t", "ed25519", "-N", "", "-C", "", "-f", "key").ExitCode.ShouldBe(0);
        tool.Write("signers", "office@example.org " + File.ReadAllText(tool.PathOf("key.pub")));
        tool.Run(
                "run",
                DemoStudy.Recipe("one-storm"),
                "--data",
                DemoStudy.Data,
                "--inputs",
                "listed",
                "--listed-above",
                "0",
                "--sign",
                "key"
            )
            .ExitCode.ShouldBe(0);
        Directory.Exists(tool.PathOf("one-storm.study/data/inputs")).ShouldBeFalse();

        var without = tool.Run("rerun", "one-storm.study");
        without.ExitCode.ShouldBe(6);
        without.Output.ShouldContain("RR0835");
        without.Output.ShouldContain("--data");
        var with = tool.Run("rerun", "one-storm.study", "--data", DemoStudy.Data, "--signers", "signers");
        with.ExitCode.ShouldBe(0, with.Output);
        with.Output.ShouldStartWith("IDENTICAL");
        with.Output.ShouldContain("  signed   by office@example.org, ED25519 SHA256:");
    }
}
