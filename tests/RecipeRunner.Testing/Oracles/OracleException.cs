namespace RecipeRunner.Testing.Oracles;

/// <summary>Something that must hold does not; the message says what, where and by how much.</summary>
public sealed class OracleException : Exception
{
    /// <summary>With what is wrong.</summary>
    public OracleException(string message)
        : base(message) { }

    /// <summary>Throws with a message, in invariant culture, unless a condition holds.</summary>
    internal static void Unless(bool condition, FormattableString message)
    {
        if (!condition)
        {
            throw new OracleException(FormattableString.Invariant(message));
        }
    }
}
