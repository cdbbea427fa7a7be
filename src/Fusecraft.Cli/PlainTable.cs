using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary>Writes tables without colours or control codes, as wide as they are where the output is no terminal.</summary>
internal static class PlainTable
{
    public static void Write(Terminal terminal, Table table)
    {
        var text = new StringWriter();
        var console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Ansi = AnsiSupport.No,
            ColorSystem = ColorSystemSupport.NoColors,
            Interactive = InteractionSupport.No,
            Out = new AnsiConsoleOutput(text),
        });
        console.Profile.Width = terminal.Width ?? 100_000;
        console.Write(table);

        // Lines end where their text does.
        foreach (var line in text.ToString().TrimEnd().ReplaceLineEndings("\n").Split('\n'))
        {
            terminal.Out.WriteLine(line.TrimEnd());
        }
    }
}
