using System.ComponentModel;
using System.Diagnostics;
using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Signing;

/// <summary>What the key tool said and returned.</summary>
/// <param name="ExitCode">0 where it did what was asked.</param>
/// <param name="Output">What it printed.</param>
/// <param name="Errors">What it complained of.</param>
internal sealed record KeyToolAnswer(int ExitCode, string Output, string Errors);

/// <summary>Calls OpenSSH's <c>ssh-keygen</c>. Keys, agents and passphrases are its own affair: nothing here ever sees one.</summary>
internal static class KeyTool
{
    private const string Program = "ssh-keygen";

    /// <summary>Calls it.</summary>
    /// <param name="input">A file that it reads as its standard input; null for none.</param>
    /// <param name="cancellation">Ends it, as when a passphrase is never typed.</param>
    /// <param name="arguments">What it is asked.</param>
    /// <exception cref="RefusedException">There is no such program.</exception>
    public static KeyToolAnswer Ask(string? input, CancellationToken cancellation, params string[] arguments)
    {
        using var process = Start(arguments);
        using var stop = cancellation.Register(() => process.Kill());
        var errors = process.StandardError.ReadToEndAsync(CancellationToken.None);
        var output = process.StandardOutput.ReadToEndAsync(CancellationToken.None);
        Feed(process, input);
        process.WaitForExit();
        cancellation.ThrowIfCancellationRequested();
        return new KeyToolAnswer(
            process.ExitCode,
            output.GetAwaiter().GetResult().Trim(),
            errors.GetAwaiter().GetResult().Trim()
        );
    }

    private static Process Start(string[] arguments)
    {
        var start = new ProcessStartInfo(Program, arguments)
        {
            UseShellExecute = false,
            RedirectStandardInput = true,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        start.Environment["LC_ALL"] = "C";
        try
        {
            return Process.Start(start)!;
        }
        catch (Win32Exception missing)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0720",
                    new Place(Program),
                    string.Create(CultureInfo.InvariantCulture, $"It cannot be started: {missing.Message}."),
                    "Signatures are made and checked by OpenSSH; install its client."
                )
            );
        }
    }

    /// <summary>Gives it a file to read. Where it has ended before it read all, its answer says why.</summary>
    private static void Feed(Process process, string? input)
    {
        var bytes = input is null ? [] : File.ReadAllBytes(input);
        try
        {
            process.StandardInput.BaseStream.Write(bytes);
            process.StandardInput.Close();
        }
        catch (IOException) when (process.WaitForExit(TimeSpan.FromSeconds(10)) && process.ExitCode != 0)
        {
            // It refused without reading; its exit code and complaint are the answer.
        }
    }
}
