using RecipeRunner.Host.Signing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Sealing;

/// <summary>
/// A study's folder in the making. It is built in <c>NAME.making</c> beside its final place and moved there when sealed;
/// disposing of it before that leaves nothing. What a killed run left is cleared by the next run to the same place.
/// </summary>
internal sealed class StudyFolder : IDisposable
{
    private const string LockName = "lock";
    private const string BuiltName = "study";
    private const string OldName = "old";

    private readonly string making;
    private readonly FileStream hold;

    private StudyFolder(string finalPath, string making, FileStream hold)
    {
        FinalPath = finalPath;
        this.making = making;
        this.hold = hold;
        Directory.CreateDirectory(Payload);
    }

    /// <summary>Where the study will lie, as the person wrote it.</summary>
    public string FinalPath { get; }

    /// <summary>The payload folder of the study in the making.</summary>
    public string Payload => Path.Combine(Built, "data");

    private string Built => Path.Combine(making, BuiltName);

    private string Old => OldOf(making);

    /// <summary>Begins a study.</summary>
    /// <param name="finalPath">Where it is to lie.</param>
    /// <param name="replace">True where a study that lies there may be replaced.</param>
    /// <exception cref="RefusedException">Something lies there that may not be replaced, or another run is writing it.</exception>
    public static StudyFolder Begin(string finalPath, bool replace)
    {
        finalPath = Path.TrimEndingDirectorySeparator(finalPath);
        RequireParent(finalPath);
        var workshop = finalPath + ".making";
        RequireOwn(workshop);
        Directory.CreateDirectory(workshop);
        var held = Hold(finalPath, workshop);
        try
        {
            ClearRemains(finalPath, workshop);
            ThrowWhereTaken(finalPath, replace);
            return new StudyFolder(finalPath, workshop, held);
        }
        catch
        {
            Release(held, workshop);
            throw;
        }
    }

    /// <summary>Writes the seal, has it signed where there is a signer, and moves the study to its place.</summary>
    /// <returns>The number of files in the study.</returns>
    public int Seal(string title, SealSigner? signer, CancellationToken cancellation)
    {
        Bag.Seal(Built, title, cancellation);
        signer?.Sign(Built, cancellation);
        var files = FileDigest.PathsBelow(Built).Count();
        cancellation.ThrowIfCancellationRequested();
        if (Directory.Exists(FinalPath))
        {
            Directory.Move(FinalPath, Old);
        }

        Directory.Move(Built, FinalPath);
        return files;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        if (Directory.Exists(Old) && !Directory.Exists(FinalPath))
        {
            Directory.Move(Old, FinalPath);
        }

        Release(hold, making);
    }

    private static string OldOf(string making) => Path.Combine(making, OldName);

    private static void RequireParent(string finalPath)
    {
        var parent = Path.GetDirectoryName(Path.GetFullPath(finalPath))!;
        if (!Directory.Exists(parent))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0705",
                    new Place(finalPath),
                    $"There is no folder {parent} to put it in.",
                    "Make that folder first, or name another with --into."
                )
            );
        }
    }

    /// <summary>What lies in the workshop must be a run's own; anything else is somebody's and is left alone.</summary>
    private static void RequireOwn(string workshop)
    {
        var strange = Directory.Exists(workshop)
            ? Directory
                .EnumerateFileSystemEntries(workshop)
                .Select(Path.GetFileName)
                .FirstOrDefault(name => name is not (LockName or BuiltName or OldName))
            : null;
        if (strange is not null || File.Exists(workshop))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0706",
                    new Place(workshop),
                    "A study is built there, but something that is not a study in the making lies there. It is left as it is.",
                    "Move it, or name another folder with --into."
                )
            );
        }
    }

    private static void DeleteOwnFolders(string making)
    {
        foreach (
            var folder in new[] { BuiltName, OldName }
                .Select(name => Path.Combine(making, name))
                .Where(Directory.Exists)
        )
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    private static FileStream Hold(string finalPath, string making)
    {
        try
        {
            return new FileStream(
                Path.Combine(making, LockName),
                FileMode.OpenOrCreate,
                FileAccess.ReadWrite,
                FileShare.None
            );
        }
        catch (IOException)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0703",
                    new Place(finalPath),
                    "Another run is writing this study.",
                    "Wait for it to end, or name another folder with --into."
                )
            );
        }
    }

    private static void ClearRemains(string finalPath, string making)
    {
        if (Directory.Exists(OldOf(making)) && !Directory.Exists(finalPath))
        {
            Directory.Move(OldOf(making), finalPath);
        }

        DeleteOwnFolders(making);
    }

    private static void ThrowWhereTaken(string finalPath, bool replace)
    {
        if (File.Exists(finalPath) || (Directory.Exists(finalPath) && !IsStudyOrEmpty(finalPath)))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0701",
                    new Place(finalPath),
                    "Something that is not a study lies there. It is left as it is.",
                    "Name another folder with --into."
                )
            );
        }

        if (Directory.Exists(finalPath) && !replace && Directory.EnumerateFileSystemEntries(finalPath).Any())
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0702",
                    new Place(finalPath),
                    "A study lies there already. It is left as it is.",
                    "Add --replace to put the new one in its place once it is complete, or name another folder with --into."
                )
            );
        }
    }

    private static bool IsStudyOrEmpty(string path) =>
        File.Exists(Path.Combine(path, "data", "audit.json")) || !Directory.EnumerateFileSystemEntries(path).Any();

    private static void Release(FileStream hold, string making)
    {
        DeleteOwnFolders(making);
        hold.Dispose();
        File.Delete(Path.Combine(making, LockName));
        Directory.Delete(making);
    }
}
