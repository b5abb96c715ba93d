using NodaTime;

namespace RecipeRunner.Host.Running;

/// <summary>The only place that reads the clock. What it says goes to <c>run.json</c> and the terminal, never into a result.</summary>
internal sealed class RunClock
{
    private readonly IClock clock;

    public RunClock()
    {
#pragma warning disable RS0030 // The one reader of the clock.
        clock = SystemClock.Instance;
#pragma warning restore RS0030
        Started = clock.GetCurrentInstant();
    }

    public Instant Started { get; }

    public Duration Elapsed => clock.GetCurrentInstant() - Started;
}
