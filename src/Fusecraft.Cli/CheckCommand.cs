using System.CommandLine;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft check FILE…</c></summary>
internal static class CheckCommand
{
    public static Command Create(Terminal terminal)
    {
        var files = CommonOptions.Files();
        var command = new ExampleCommand("check", "Reads mechanism files and lists all problems with line and column.", "fusecraft check docs/workshop/*.fuse.json") { files };
        command.SetAction(parsed => Run(terminal, parsed.GetRequiredValue(files)));
        return command;
    }

    private static int Run(Terminal terminal, string[] files)
    {
        var code = ExitCodes.Done;
        foreach (var file in files)
        {
            try
            {
                var mechanism = MechanismInput.Load(file);
                terminal.Out.WriteLine($"{file}: ok, {mechanism.Name}: {ExaminationText.Size(mechanism)}");
            }
            catch (InputException exception)
            {
                terminal.Complain(exception);
                code = ExitCodes.BadInput;
            }
        }

        return code;
    }
}
