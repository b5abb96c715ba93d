using System.Diagnostics;
using System.Runtime.InteropServices;

namespace RecipeRunner.Benchmarks;

/// <summary>One run: how long it took, and a number that must agree between the tool and its baselines.</summary>
[StructLayout(LayoutKind.Auto)]
internal readonly record struct Sample(double Milliseconds, double Result)
{
    public static Sample Of(Func<double> work)
    {
        GC.Collect();
        var watch = Stopwatch.StartNew();
        double result = work();
        return new Sample(watch.Elapsed.TotalMilliseconds, result);
    }
}
