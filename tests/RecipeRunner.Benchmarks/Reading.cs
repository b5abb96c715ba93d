using System.Globalization;
using nietras.SeparatedValues;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps;
using RecipeRunner.Testing;

namespace RecipeRunner.Benchmarks;

/// <summary>Reading a wide record file of 400 gauges and 100,000 steps: against Sep alone, and against pandas.</summary>
internal static class Reading
{
    private const string FileName = "wide.csv";
    private const int Gauges = 400;
    private const int Steps = 100_000;
    private const int Rounds = 7;

    /// <summary>Prints the rows of the table, or in a process of its own what memory the reading takes.</summary>
    /// <param name="folder">Where the file is made.</param>
    /// <param name="what"><c>reading</c> or <c>reading-memory</c>.</param>
    public static void Run(string folder, string what)
    {
        string path = Path.Combine(folder, FileName);
        if (!File.Exists(path))
        {
            Write(path);
        }

        if (what == "reading-memory")
        {
            PrintMemory(folder);
            return;
        }

        Console.Out.Write(
            string.Create(
                CultureInfo.InvariantCulture,
                $"{Environment.ProcessorCount} processors, .NET {Environment.Version}, {new FileInfo(path).Length / 1e6:F0} MB\n\n"
            )
        );
        Console.Out.Write("| work | baseline | median | tool | median | tool / baseline | times faster |\n");
        Console.Out.Write("|---|---|---|---|---|---|---|\n");
        using var pandas = new Baseline("/usr/bin/python3", "Baselines/read_pandas.py", path);
        Contest.Run(
            string.Create(CultureInfo.InvariantCulture, $"Wide CSV, {Gauges} gauges × {Steps:N0} steps"),
            Rounds,
            [new("ReadRecords", () => Sample.Of(() => Sum(Ours(folder))))],
            [new("Sep alone", () => Sample.Of(() => BareSep(path))), new("pandas", pandas.Run)]
        );
    }

    private static RainRecords Ours(string folder) =>
        new RecipeVerbs(new TrialStudy(folder)).ReadRecords(
            FileName,
            RainUnit.Millimetres,
            TimeStep.Minutes(15),
            missing: ["-9999"]
        );

    private static double Sum(RainRecords records)
    {
        double sum = 0;
        for (int step = 0; step < records.Times.Count; step++)
        {
            foreach (double depth in records.DepthsAt(step))
            {
                sum += depth;
            }
        }

        return sum;
    }

    /// <summary>Sep with its own defaults, into one array, and the same sum of it.</summary>
    private static double BareSep(string path)
    {
        double[] depths = new double[Gauges * Steps];
        int at = 0;
        using SepReader reader = Sep.Reader().FromFile(path);
        foreach (SepReader.Row row in reader)
        {
            for (int column = 1; column <= Gauges; column++)
            {
                depths[at++] = row[column].Parse<double>();
            }
        }

        double sum = 0;
        foreach (double depth in depths)
        {
            sum += depth;
        }

        return sum;
    }

    private static void PrintMemory(string folder)
    {
        RainRecords records = Ours(folder);
        string peak = File.ReadLines("/proc/self/status")
            .Single(line => line.StartsWith("VmHWM", StringComparison.Ordinal));
        Console.Out.Write(
            string.Create(
                CultureInfo.InvariantCulture,
                $"\nPeak memory of a process that reads the file once: {peak[6..].Trim()}; the numbers alone are {records.Times.Count * (long)records.GaugeIds.Length * sizeof(double) / 1024:N0} kB.\n"
            )
        );
    }

    /// <summary>Depths of one decimal from a fixed seed.</summary>
    private static void Write(string path)
    {
        var random = new Random(1);
        using var writer = new StreamWriter(path + ".part");
        writer.Write("time");
        for (int gauge = 0; gauge < Gauges; gauge++)
        {
            writer.Write(string.Create(CultureInfo.InvariantCulture, $",G{gauge:000}"));
        }

        var time = new DateTime(2000, 1, 1, 0, 0, 0, DateTimeKind.Unspecified);
        for (int step = 0; step < Steps; step++)
        {
            writer.Write(
                string.Create(CultureInfo.InvariantCulture, $"\n{time.AddMinutes(15 * step):yyyy-MM-ddTHH:mm}")
            );
            for (int gauge = 0; gauge < Gauges; gauge++)
            {
                writer.Write([',', (char)('0' + random.Next(10)), '.', (char)('0' + random.Next(10))]);
            }
        }

        writer.Write('\n');
        writer.Dispose();
        File.Move(path + ".part", path);
    }
}
