using RecipeRunner.Host.Running;

namespace RecipeRunner.Cli.Printing;

/// <summary>Watches a run of which only the end is told; long steps show a passing bar.</summary>
internal sealed class QuietObserver(Screen screen) : IRunObserver
{
    private const int WordWidth = 11;

    /// <inheritdoc/>
    public void Titled(string title) { }

    /// <inheritdoc/>
    public void Progressed(string word, double share) =>
        screen.Status(ProgressLine.Of(word.PadRight(WordWidth), share, secondsLeft: null));

    /// <inheritdoc/>
    public void Finished(JournalEntry entry) => screen.ClearStatus();
}
