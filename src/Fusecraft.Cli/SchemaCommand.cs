using System.CommandLine;
using Fusecraft.Mechanisms;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft schema</c></summary>
internal static class SchemaCommand
{
    public static Command Create(Terminal terminal)
    {
        var command = new ExampleCommand("schema", "Prints the JSON Schema of mechanism files, for editors that check while you type.", "fusecraft schema > mechanism.schema.json");
        command.SetAction(_ =>
        {
            terminal.Out.WriteLine(MechanismFile.Schema.TrimEnd());
            return ExitCodes.Done;
        });
        return command;
    }
}
