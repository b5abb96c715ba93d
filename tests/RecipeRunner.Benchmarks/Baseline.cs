using System.Diagnostics;
using System.Globalization;

namespace RecipeRunner.Benchmarks;

/// <summary>A baseline in its own process: one run for each line it is sent, answered with milliseconds and a result.</summary>
internal sealed class Baseline : IDisposable
{
    private readonly Process process;

    public Baseline(string program, params string[] arguments)
    {
        process =
            Process.Start(
                new ProcessStartInfo(program, arguments)
                {
                    UseShellExecute = false,
                    RedirectStandardInput = true,
                    RedirectStandardOutput = true,
                }
            ) ?? throw new InvalidOperationException($"{program} did not start");
        if (process.StandardOutput.ReadLine() != "ready")
        {
            throw new InvalidOperationException($"{program} is not ready: run run.sh, which installs the baselines");
        }
    }

    public Sample Run()
    {
        process.StandardInput.Write('\n');
        process.StandardInput.Flush();
        string answer = process.StandardOutput.ReadLine() ?? throw new InvalidOperationException("the baseline ended");
        double[] fields = [.. answer.Split(' ').Select(field => double.Parse(field, CultureInfo.InvariantCulture))];
        return new Sample(fields[0], fields[1]);
    }

    public void Dispose()
    {
        process.StandardInput.Close();
        process.WaitForExit();
        process.Dispose();
    }
}
