using System.Collections.Immutable;
using System.Security.Cryptography;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Running;

/// <summary>
/// The input files of a run. Each is copied into the study and digested in one pass when it is first opened; steps read
/// the copy, so that what the study holds is what was read. Files above a size may be listed instead: digested before the first
/// step reads them and again when the run ends, and left where they lie.
/// </summary>
internal sealed class InputFiles(DataFolder data, string payload, long? listAbove)
{
    private const int BufferBytes = 1 << 20;

    private readonly SortedDictionary<string, FileRecord> records = new(StringComparer.Ordinal);

    public ImmutableArray<FileRecord> Records => [.. records.Values];

    public bool Exists(string name) => data.Exists(name);

    public ImmutableArray<string> Find(string pattern) => data.Find(pattern);

    public Stream Open(string name, CancellationToken cancellation)
    {
        var source = data.PathOf(name);
        if (!records.TryGetValue(name, out var record))
        {
            record = Take(name, source, cancellation);
            records.Add(name, record);
        }

        var path = record.IsHeld ? CopyOf(name) : source;
        return new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.Read, BufferBytes);
    }

    /// <summary>Refuses the run if a listed file is no longer what was digested before it was read.</summary>
    public void ThrowWhereChanged(CancellationToken cancellation)
    {
        foreach (var (name, record) in records.Where(pair => !pair.Value.IsHeld))
        {
            cancellation.ThrowIfCancellationRequested();
            var now = FileDigest.Of(data.Root, name);
            if (now.Bytes != record.Bytes || !string.Equals(now.Sha256, record.Sha256, StringComparison.Ordinal))
            {
                throw new RefusedException(
                    Finding.Error(
                        "RR0124",
                        new Place(name),
                        "The file changed while the recipe ran, and its results cannot be told apart.",
                        "Run again once nothing writes the file, or let the study hold a copy: --inputs copied."
                    )
                );
            }
        }
    }

    private FileRecord Take(string name, string source, CancellationToken cancellation)
    {
        var shown = "inputs/" + name;
        return new FileInfo(source).Length > listAbove
            ? FileDigest.Of(data.Root, name) with
            {
                Path = shown,
                IsHeld = false,
            }
            : Copy(source, CopyOf(name), shown, cancellation);
    }

    private string CopyOf(string name) => Path.Combine(payload, "inputs", name);

    private static FileRecord Copy(string source, string copy, string shown, CancellationToken cancellation)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(copy)!);
        using var from = new FileStream(source, FileMode.Open, FileAccess.Read, FileShare.Read, 1);
        using var to = new FileStream(copy, FileMode.CreateNew, FileAccess.Write, FileShare.None, 1);
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        var buffer = new byte[BufferBytes];
        long total = 0;
        for (int read; (read = from.Read(buffer)) > 0; total += read)
        {
            cancellation.ThrowIfCancellationRequested();
            hash.AppendData(buffer, 0, read);
            to.Write(buffer, 0, read);
        }

        return new FileRecord(shown, total, Convert.ToHexStringLower(hash.GetHashAndReset()));
    }
}
