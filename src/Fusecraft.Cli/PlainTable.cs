using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary>Writes tables without colours or control codes, as wide as they are where the output is no terminal.</summary>
internal static class PlainTable
{
    public static void Write(Terminal terminal, Table table)
    {
        var console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Ansi = AnsiSupport.No,
            ColorSystem = ColorSystemSupport.NoColors,
            Interactive = InteractionSupport.No,
            Out = new AnsiConsoleOutput(terminal.Out),
        });
        console.Profile.Width = terminal.Width ?? 100_000;
        console.Write(table);
    }
}
