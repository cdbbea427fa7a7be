using System.CommandLine;
using Fusecraft.Mechanisms;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft new cube|board|graph|custom -o FILE</c></summary>
internal static class NewCommand
{
    public static Command Create(Terminal terminal)
    {
        var kind = new Argument<string>("KIND") { Description = "What kind of puzzle to start from." };
        kind.AcceptOnlyFromAmong([.. StarterMechanisms.Kinds]);
        var output = new Option<string>("--output", "-o") { Description = "The file to write, by custom named something" + MechanismFile.Extension + ".", HelpName = "FILE", Required = true };
        var force = new Option<bool>("--force") { Description = "Replaces the file if it exists." };
        var command = new ExampleCommand("new", "Writes a mechanism file to start from; its \"about\" says what to change.", "fusecraft new custom -o lock.fuse.json") { kind, output, force };
        command.SetAction(parsed => Run(terminal, parsed.GetRequiredValue(kind), parsed.GetRequiredValue(output), parsed.GetValue(force)));
        return command;
    }

    private static int Run(Terminal terminal, string kind, string path, bool force)
    {
        if (Directory.Exists(path))
        {
            throw new InputException($"{path}: this is a folder, not a file");
        }

        if (!force && File.Exists(path))
        {
            throw new InputException($"{path}: the file exists already; --force replaces it");
        }

        try
        {
            MechanismFile.Save(StarterMechanisms.Of(kind), path);
        }
        catch (DirectoryNotFoundException)
        {
            throw new InputException($"{path}: there is no such folder");
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            throw new InputException($"{path}: the file cannot be written: {exception.Message}");
        }

        terminal.Out.WriteLine($"Wrote {path}. Change it, then try: fusecraft examine {path}");
        return ExitCodes.Done;
    }
}
