namespace RecipeRunner.Host.Running;

/// <summary>Watches a run, to tell a person how it goes.</summary>
public interface IRunObserver
{
    /// <summary>The recipe gave its title.</summary>
    void Titled(string title);

    /// <summary>A step has come so far.</summary>
    /// <param name="word">The step's word.</param>
    /// <param name="share">0 to 1.</param>
    void Progressed(string word, double share);

    /// <summary>A step has ended.</summary>
    void Finished(JournalEntry entry);
}
