using System.Diagnostics;
using System.Text.Json.Nodes;

namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>What a process said and returned.</summary>
public sealed record Said(int ExitCode, string Output, string Errors);

/// <summary>The tool as its users run it: a real process in a folder of its own.</summary>
public sealed class Tool : IDisposable
{
    public string Folder { get; } = Directory.CreateTempSubdirectory("recipe-runner-e2e-").FullName;

    /// <summary>The top of the repository.</summary>
    public static string Repository { get; } =
        Path.GetFullPath(Path.Combine(Testing.ReferenceFolder.PathOf("README.md"), "..", "..", ".."));

    private static string Program => Path.Combine(AppContext.BaseDirectory, "recipe-runner.dll");

    public Said Run(params string[] arguments) => Run([], arguments);

    public Said Run((string Name, string Value)[] environment, params string[] arguments)
    {
        using var process = Start("dotnet", [Program, .. arguments], environment);
        return Wait(process);
    }

    /// <summary>Runs the tool without its build's invariant culture: it then has the cultures of its environment.</summary>
    public Said RunWithCultures((string Name, string Value)[] environment, params string[] arguments)
    {
        var settings = JsonNode.Parse(File.ReadAllText(Path.ChangeExtension(Program, ".runtimeconfig.json")))!;
        settings["runtimeOptions"]!["configProperties"]!["System.Globalization.Invariant"] = false;
        var config = Write("cultures.runtimeconfig.json", settings.ToJsonString());
        using var process = Start("dotnet", ["exec", "--runtimeconfig", config, Program, .. arguments], environment);
        return Wait(process);
    }

    /// <summary>Starts the tool and does not wait for it.</summary>
    public Process Begin(params string[] arguments) => Start("dotnet", [Program, .. arguments], []);

    /// <summary>Runs the tool, and sends it a signal once a file appears; also where whoever runs the tests ignores SIGINT, as a job in the background does.</summary>
    public Said RunAndInterrupt(string signal, Func<bool> when, params string[] arguments)
    {
        using var process = Start("env", ["--default-signal=INT", "dotnet", Program, .. arguments], []);
        for (var tries = 0; !when() && tries < 600; tries++)
        {
            Thread.Sleep(50);
        }

        Command("kill", "-s", signal, FormattableString.Invariant($"{process.Id}")).ExitCode.ShouldBe(0);
        return Wait(process);
    }

    /// <summary>Runs another program in the folder.</summary>
    public Said Command(string program, params string[] arguments)
    {
        using var process = Start(program, arguments, []);
        return Wait(process);
    }

    public string PathOf(string name) => Path.Combine(Folder, name);

    public string Write(string name, string text)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(PathOf(name))!);
        File.WriteAllText(PathOf(name), text);
        return PathOf(name);
    }

    public void Dispose() => Directory.Delete(Folder, recursive: true);

    private Process Start(string program, string[] arguments, (string Name, string Value)[] environment)
    {
        var start = new ProcessStartInfo(program, arguments)
        {
            UseShellExecute = false,
            WorkingDirectory = Folder,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        foreach (var (name, value) in environment)
        {
            start.Environment[name] = value;
        }

        return Process.Start(start)!;
    }

    private static Said Wait(Process process)
    {
        var errors = process.StandardError.ReadToEndAsync();
        var output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        return new Said(process.ExitCode, output, errors.GetAwaiter().GetResult());
    }
}
