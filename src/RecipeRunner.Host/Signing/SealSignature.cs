using System.Text.RegularExpressions;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Signing;

/// <summary>Who signed a study.</summary>
/// <param name="KeyType">The kind of key, such as ED25519.</param>
/// <param name="Fingerprint">The key's fingerprint, such as <c>SHA256:…</c>.</param>
/// <param name="Identity">The signer's name in the list of signers; null where no list was given.</param>
public sealed record Signer(string KeyType, string Fingerprint, string? Identity);

/// <summary>The signature beside a study's seal.</summary>
internal static partial class SealSignature
{
    /// <summary>The signature's file.</summary>
    public const string FileName = Signed + ".sig";

    /// <summary>What is signed: it digests all other files of the seal, and they the payload.</summary>
    public const string Signed = "tagmanifest-sha256.txt";

    /// <summary>What the signature is for, so that one made for another purpose does not count.</summary>
    public const string Namespace = "recipe-runner";

    /// <summary>Checks the signature.</summary>
    /// <param name="folder">The study's folder.</param>
    /// <param name="signers">A list of allowed signers (ssh-keygen(1), ALLOWED SIGNERS); null where any key will do.</param>
    /// <param name="cancellation">Ends it.</param>
    /// <returns>Who signed; null where nobody did and no list was given.</returns>
    /// <exception cref="RefusedException">The signature is not one of this seal by an allowed signer, or cannot be checked.</exception>
    public static Signer? Check(string folder, string? signers, CancellationToken cancellation)
    {
        if (signers is not null && !File.Exists(signers))
        {
            throw Refusal("RR0832", signers, "There is no such list of signers.", "Name it with --signers.");
        }

        if (File.Exists(Path.Combine(folder, FileName)))
        {
            return Read(folder, signers, cancellation);
        }

        return signers is null
            ? null
            : throw Refusal("RR0833", FileName, "The study is not signed.", "Leave --signers out, or have it signed.");
    }

    private static Signer Read(string folder, string? signers, CancellationToken cancellation)
    {
        var any = Ask(folder, cancellation, "-Y", "check-novalidate", "-n", Namespace);
        var good = Good().Match(any.Output);
        if (any.ExitCode != 0 || !good.Success)
        {
            throw Refusal(
                "RR0831",
                FileName,
                $"This is no signature of the study's seal: {any.Errors} {any.Output}".TrimEnd(),
                "Take the study from its signer again."
            );
        }

        var signer = new Signer(good.Groups["type"].Value, good.Groups["print"].Value, Identity: null);
        return signers is null ? signer : Allowed(folder, signer, signers, cancellation);
    }

    private static Signer Allowed(string folder, Signer signer, string signers, CancellationToken cancellation)
    {
        var names = Ask(folder, cancellation, "-Y", "find-principals", "-f", signers);
        var known = names
            .Output.Split('\n', StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries)
            .FirstOrDefault(name =>
                names.ExitCode == 0
                && Ask(folder, cancellation, "-Y", "verify", "-n", Namespace, "-f", signers, "-I", name).ExitCode == 0
            );
        return known is not null
            ? signer with
            {
                Identity = known,
            }
            : throw Refusal(
                "RR0834",
                FileName,
                $"It was signed by {signer.KeyType} {signer.Fingerprint}, which {signers} does not allow.",
                "Ask the signer for the public key, and add it to the list if you trust it."
            );
    }

    private static KeyToolAnswer Ask(string folder, CancellationToken cancellation, params string[] arguments) =>
        KeyTool.Ask(Path.Combine(folder, Signed), cancellation, [.. arguments, "-s", Path.Combine(folder, FileName)]);

    private static RefusedException Refusal(string code, string place, string what, string mend) =>
        new(Finding.Error(code, new Place(place), what, mend));

    [GeneratedRegex(
        "^Good \"recipe-runner\" signature with (?<type>\\S+) key (?<print>SHA256:\\S+)$",
        RegexOptions.CultureInvariant | RegexOptions.ExplicitCapture,
        matchTimeoutMilliseconds: 1_000
    )]
    private static partial Regex Good();
}
