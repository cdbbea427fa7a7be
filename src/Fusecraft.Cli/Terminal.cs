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
