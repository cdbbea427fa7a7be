namespace Fusecraft.Cli;

/// <summary>Where a run writes to: answers to <see cref="Out"/>, messages and progress to <see cref="Error"/>.</summary>
internal sealed class Terminal
{
    public Terminal(TextWriter output, TextWriter error)
    {
        Out = output;
        Error = error;
        Width = ReferenceEquals(output, Console.Out) && !Console.IsOutputRedirected ? WindowWidth() : null;
        ShowsProgress = ReferenceEquals(error, Console.Error) && !Console.IsErrorRedirected;
    }

    public TextWriter Out { get; }

    public TextWriter Error { get; }

    /// <summary>Characters a line of <see cref="Out"/>; null where it is no terminal, so that nothing needs to be wrapped.</summary>
    public int? Width { get; }

    /// <summary>True when <see cref="Error"/> is a terminal that somebody may be watching.</summary>
    public bool ShowsProgress { get; }

    /// <summary>Tells the user what is wrong with what they gave.</summary>
    public void Complain(InputException exception) => Error.WriteLine(exception.Message.ReplaceLineEndings(Error.NewLine));

    private static int? WindowWidth()
    {
        try
        {
            return Console.WindowWidth > 0 ? Console.WindowWidth : null;
        }
        catch (IOException)
        {
            return null;
        }
    }
}
