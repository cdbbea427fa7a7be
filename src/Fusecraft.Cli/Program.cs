using System.Text;

namespace Fusecraft.Cli;

internal static class Program
{
    private static async Task<int> Main(string[] args)
    {
        // JSON and names are UTF-8 everywhere, whatever the terminal's habits.
        Console.OutputEncoding = new UTF8Encoding(encoderShouldEmitUTF8Identifier: false);
        using var interrupt = new CancellationTokenSource();
        Console.CancelKeyPress += (_, pressed) =>
        {
            // The first Ctrl-C ends the work cleanly, the second one ends the process.
            pressed.Cancel = !interrupt.IsCancellationRequested;
            interrupt.Cancel();
        };
        return await Cli.RunAsync(args, Console.Out, Console.Error, interrupt.Token);
    }
}
