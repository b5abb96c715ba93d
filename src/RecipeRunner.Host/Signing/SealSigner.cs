using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Signing;

/// <summary>
/// Signs a study's seal with the signer's own SSH key: an SSHSIG signature (OpenSSH, PROTOCOL.sshsig) of the tag manifest, which
/// digests all else. Made before a run starts, so that a key that is not there is told before the work is done.
/// </summary>
internal sealed class SealSigner
{
    private readonly string key;

    private SealSigner(string key) => this.key = key;

    /// <summary>The signer with a key; null where none is asked for.</summary>
    /// <param name="key">The private key's file, or the public key's where an agent holds the private one.</param>
    /// <param name="cancellation">Ends it.</param>
    /// <exception cref="RefusedException">The file is no key, or OpenSSH is not there.</exception>
    public static SealSigner? Of(string? key, CancellationToken cancellation)
    {
        if (key is null)
        {
            return null;
        }

        if (!File.Exists(key))
        {
            throw Refusal("RR0721", key, "There is no such key.", "Name the file of your SSH key with --sign.");
        }

        var answer = KeyTool.Ask(null, cancellation, "-l", "-f", key);
        return answer.ExitCode == 0
            ? new SealSigner(key)
            : throw Refusal(
                "RR0721",
                key,
                $"ssh-keygen does not take it for a key: {answer.Errors} {answer.Output}".TrimEnd(),
                "Name the file of your SSH key with --sign."
            );
    }

    /// <summary>Signs the seal of a study that is complete but for this.</summary>
    /// <param name="folder">The study's folder.</param>
    /// <param name="cancellation">Ends it.</param>
    /// <exception cref="RefusedException">The key could not be used.</exception>
    public void Sign(string folder, CancellationToken cancellation)
    {
        var answer = KeyTool.Ask(
            null,
            cancellation,
            ["-Y", "sign", "-n", SealSignature.Namespace, "-f", key, Path.Combine(folder, SealSignature.Signed)]
        );
        if (answer.ExitCode != 0 || !File.Exists(Path.Combine(folder, SealSignature.FileName)))
        {
            throw Refusal(
                "RR0722",
                key,
                $"The study was not signed; ssh-keygen says: {answer.Errors}",
                "Run where the passphrase can be typed, or add the key to an agent with ssh-add."
            );
        }
    }

    private static RefusedException Refusal(string code, string key, string what, string mend) =>
        new(Finding.Error(code, new Place(key), what, mend));
}
