using System.Globalization;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace RecipeRunner.Testing.Oracles;

/// <summary>Something that must hold does not; the message says what, where and by how much.</summary>
public sealed class OracleException : Exception
{
    /// <summary>With what is wrong.</summary>
    public OracleException(string message)
        : base(message) { }

    /// <summary>Throws unless a condition holds; the message is made only then, in invariant culture.</summary>
    internal static void Unless(
        bool condition,
        [InterpolatedStringHandlerArgument(nameof(condition))] ref Complaint message
    )
    {
        if (!condition)
        {
            throw new OracleException(message.ToStringAndClear());
        }
    }

    [InterpolatedStringHandler]
    [StructLayout(LayoutKind.Auto)]
    internal ref struct Complaint
    {
        private DefaultInterpolatedStringHandler text;

        public Complaint(int literalLength, int formattedCount, bool condition, out bool isNeeded)
        {
            isNeeded = !condition;
            text = isNeeded ? new(literalLength, formattedCount, CultureInfo.InvariantCulture) : default;
        }

        public void AppendLiteral(string value) => text.AppendLiteral(value);

        public void AppendFormatted<T>(T value, string? format = null) => text.AppendFormatted(value, format);

        public string ToStringAndClear() => text.ToStringAndClear();
    }
}
