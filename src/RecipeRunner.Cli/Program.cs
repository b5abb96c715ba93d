using System.Globalization;
using RecipeRunner.Cli.Commands;
using RecipeRunner.Cli.Printing;
using Spectre.Console.Cli;

CultureInfo.DefaultThreadCurrentCulture = CultureInfo.InvariantCulture;
CultureInfo.DefaultThreadCurrentUICulture = CultureInfo.InvariantCulture;
Thread.CurrentThread.CurrentCulture = CultureInfo.InvariantCulture;
Thread.CurrentThread.CurrentUICulture = CultureInfo.InvariantCulture;

var screen = new Screen();
var app = new CommandApp();
app.Configure(config => CommandList.Describe(config, screen));
using var stop = new StopSignal();
try
{
    return await app.RunAsync(args, stop.Token);
}
catch (CommandAppException misuse)
{
    screen.Error($"{misuse.Message}");
    screen.Error(
        "`recipe-runner --help` lists the commands; `recipe-runner COMMAND --help` shows one with an example."
    );
    return ExitCode.WrongUsage;
}
catch (OperationCanceledException) when (stop.Token.IsCancellationRequested)
{
    screen.Error("cancelled; nothing was written");
    return ExitCode.Cancelled;
}
