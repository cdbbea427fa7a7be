namespace Fusecraft.Cli;

/// <summary>Something the user gave is wrong; the message is all they need to know.</summary>
internal sealed class InputException : Exception
{
    public InputException(string message)
        : base(message)
    {
    }
}
