using System.Security.Cryptography;

namespace RecipeRunner.Model.Steps;

/// <summary>
/// What a step takes or gives: immutable, with a digest of its content and a lineage that says which study and which
/// journal entry made it.
/// </summary>
public abstract class Artifact
{
    private readonly Lazy<string> digest;

    /// <summary>Creates an artifact that no study has taken in yet.</summary>
    protected Artifact() => digest = new Lazy<string>(ComputeDigest);

    /// <summary>SHA-256 over the canonical form, as lower-case hexadecimal.</summary>
    public string Digest => digest.Value;

    /// <summary>Which study and journal entry made it; null before a study has taken it in.</summary>
    public Lineage? Lineage { get; private set; }

    /// <summary>Runs a step in the study that this artifact belongs to. Verbs are one-line extension methods around it.</summary>
    /// <typeparam name="T">What the step gives.</typeparam>
    /// <param name="step">The step, holding this artifact and the settings.</param>
    /// <returns>The step's result, journalled.</returns>
    /// <exception cref="InvalidOperationException">The artifact belongs to no study.</exception>
    /// <exception cref="RefusedException">The step refuses its input.</exception>
    public T Run<T>(Step<T> step)
        where T : Artifact =>
        (
            Lineage
            ?? throw new InvalidOperationException(
                "This artifact was not made by a study, so no step can be run on it."
            )
        ).Study.Run(step);

    /// <summary>A few words for the line that a run prints, such as <c>22 gauges, EPSG:4326</c>.</summary>
    public abstract string Describe();

    /// <summary>Writes everything that makes this artifact what it is, in a fixed order.</summary>
    /// <param name="writer">Takes the canonical form.</param>
    protected abstract void WriteCanonical(CanonicalWriter writer);

    /// <summary>Takes the artifact into a study, once.</summary>
    internal void Adopt(Lineage lineage)
    {
        if (Lineage is not null)
        {
            throw new InvalidOperationException("A step must return a new artifact, not one that it was given.");
        }

        Lineage = lineage;
    }

    private string ComputeDigest()
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        var writer = new CanonicalWriter(hash);
        writer.Write(GetType().FullName!);
        WriteCanonical(writer);
        writer.Flush();
        return Convert.ToHexStringLower(hash.GetHashAndReset());
    }
}
