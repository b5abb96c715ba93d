using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Support;

/// <summary>A text: the simplest artifact, so that the host is tested without any built-in step.</summary>
public sealed class Words(string text) : Artifact
{
    public string Text { get; } = text;

    public override string Describe() => $"{Text.Length} letters";

    protected override void WriteCanonical(CanonicalWriter writer) => writer.Write(Text);
}

/// <summary>Reads a text.</summary>
[Step("Read words")]
public sealed record ReadWordsStep(string File) : Step<Words>
{
    public override Words Execute(StepContext context)
    {
        using var reader = new StreamReader(context.OpenInput(File));
        var text = reader.ReadToEnd();
        if (text.Contains("bad", StringComparison.Ordinal))
        {
            throw new RefusedException(
                Finding.Error("XX0001", new Place(File, 1, 1), "It holds a bad word.", "Take it out.")
            );
        }

        context.Assume("Words mean what they say.");
        return new Words(text);
    }
}

/// <summary>Names the files that a pattern means.</summary>
[Step("List words")]
public sealed record ListWordsStep(string Pattern) : Step<Words>
{
    public override Words Execute(StepContext context)
    {
        var names = context.FindInputs(Pattern);
        foreach (var name in names)
        {
            context.OpenInput(name).Dispose();
        }

        return new Words(string.Join(" ", names));
    }
}

/// <summary>Joins two texts.</summary>
[Step("Join words", Source = "Nobody 1900")]
public sealed record JoinWordsStep(Words First, Words Second, string With, double Strength) : Step<Words>
{
    public override Words Execute(StepContext context)
    {
        context.State("joint", With);
        context.Find(Finding.Notice("XX0002", Place.Of("joint"), "They were joined."));
        return new Words(First.Text + With + Second.Text);
    }
}

/// <summary>Writes a text.</summary>
[Step("Write words")]
public sealed record WriteWordsStep(Words Words, string Path) : Step<Words>
{
    public override Words Execute(StepContext context)
    {
        using var writer = new StreamWriter(context.CreateOutput(Path));
        writer.Write(Words.Text);
        return new Words(Words.Text);
    }
}

/// <summary>Waits to be stopped.</summary>
[Step("Wait")]
public sealed record WaitStep(Words Words) : Step<Words>
{
    public override Words Execute(StepContext context)
    {
        context.Cancellation.WaitHandle.WaitOne();
        context.Cancellation.ThrowIfCancellationRequested();
        return new Words(Words.Text);
    }
}

/// <summary>The verbs of the tests' own language.</summary>
public sealed class WordVerbs(IStudy study)
{
    public static Words? Kept { get; set; }

    public void Title(string text) => study.Title(text);

    public void Note(string text) => study.Note(text);

    public void Source(string file, string text, string? licence = null) => study.Source(file, text, licence);

    public T Setting<T>(string name, T @default)
        where T : notnull => study.Setting(name, @default);

    public Words Read(string file) => study.Run(new ReadWordsStep(file));

    public Words List(string pattern) => study.Run(new ListWordsStep(pattern));

    public Words Write(Words words, string path) => study.Run(new WriteWordsStep(words, path));

    public Words Wait(Words words) => study.Run(new WaitStep(words));
}

/// <summary>An extension verb.</summary>
public static class JoinWordsVerb
{
    /// <inheritdoc cref="JoinWordsStep"/>
    public static Words Join(this Words first, Words second, string with = "-", double strength = 1) =>
        first.Run(new JoinWordsStep(first, second, with, strength));
}
