using System.Collections.Immutable;
using System.Security.Cryptography;

namespace RecipeRunner.Host.Running;

/// <summary>
/// The input files of a run. Each is copied into the study and digested in one pass when it is first opened; steps read
/// the copy, so that what the study holds is what was read.
/// </summary>
internal sealed class InputFiles(DataFolder data, string payload)
{
    private const int BufferBytes = 1 << 20;

    private readonly SortedDictionary<string, FileRecord> records = new(StringComparer.Ordinal);

    public ImmutableArray<FileRecord> Records => [.. records.Values];

    public bool Exists(string name) => data.Exists(name);

    public ImmutableArray<string> Find(string pattern) => data.Find(pattern);

    public Stream Open(string name, CancellationToken cancellation)
    {
        var source = data.PathOf(name);
        var copy = Path.Combine(payload, "inputs", name);
        if (!records.ContainsKey(name))
        {
            records.Add(name, Copy(source, copy, "inputs/" + name, cancellation));
        }

        return new FileStream(copy, FileMode.Open, FileAccess.Read, FileShare.Read, BufferBytes);
    }

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
