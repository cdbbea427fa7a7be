using System.CommandLine;
using System.CommandLine.Help;
using System.CommandLine.Invocation;

namespace Fusecraft.Cli;

/// <summary>The usual help of a command, followed by its examples.</summary>
internal sealed class Help : SynchronousCommandLineAction
{
    private readonly HelpAction _usual;

    private Help(HelpAction usual) => _usual = usual;

    /// <inheritdoc/>
    public override bool ClearsParseErrors => true;

    /// <summary>Makes the help option of a root command, and with it of all its commands, show examples.</summary>
    public static void Install(RootCommand root)
    {
        var option = root.Options.OfType<HelpOption>().Single();
        option.Description = "Shows this help.";
        option.Action = new Help((HelpAction)option.Action!);
    }

    /// <inheritdoc/>
    public override int Invoke(ParseResult parseResult)
    {
        _usual.Invoke(parseResult);
        if (parseResult.CommandResult.Command is ExampleCommand { Examples: { Length: > 0 } examples })
        {
            var output = parseResult.InvocationConfiguration.Output;
            output.WriteLine(examples.Length == 1 ? "Example:" : "Examples:");
            foreach (var example in examples)
            {
                output.WriteLine("  " + example);
            }

            output.WriteLine();
        }

        return ExitCodes.Done;
    }
}
