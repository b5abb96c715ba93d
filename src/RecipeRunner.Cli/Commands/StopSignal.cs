using System.Runtime.InteropServices;

namespace RecipeRunner.Cli.Commands;

/// <summary>Turns Ctrl-C and a polite kill into a cancellation, so that a run can clear up. A second Ctrl-C ends at once.</summary>
internal sealed class StopSignal : IDisposable
{
    private readonly CancellationTokenSource source = new();
    private readonly PosixSignalRegistration interrupt;
    private readonly PosixSignalRegistration terminate;

    public StopSignal()
    {
        interrupt = PosixSignalRegistration.Create(PosixSignal.SIGINT, Stop);
        terminate = PosixSignalRegistration.Create(PosixSignal.SIGTERM, Stop);
    }

    public CancellationToken Token => source.Token;

    public void Dispose()
    {
        interrupt.Dispose();
        terminate.Dispose();
        source.Dispose();
    }

    private void Stop(PosixSignalContext context)
    {
        context.Cancel = !source.IsCancellationRequested;
        source.Cancel();
    }
}
