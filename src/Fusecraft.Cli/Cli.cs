using System.CommandLine;
using System.CommandLine.Invocation;
using System.Reflection;

namespace Fusecraft.Cli;

/// <summary>The whole command line: parses the arguments, runs one command, and turns every failure into one message and an exit code.</summary>
internal static class Cli
{
    /// <summary>Runs the command line.</summary>
    /// <param name="args">The arguments, without the program's name.</param>
    /// <param name="output">Takes the answer.</param>
    /// <param name="error">Takes messages.</param>
    /// <param name="cancellationToken">Interrupts the run.</param>
    /// <returns>One of <see cref="ExitCodes"/>.</returns>
    public static async Task<int> RunAsync(string[] args, TextWriter output, TextWriter error, CancellationToken cancellationToken = default)
    {
        var terminal = new Terminal(output, error);
        try
        {
            var root = Root(terminal);
            var parsed = root.Parse(args, new ParserConfiguration { ResponseFileTokenReplacer = null });
            return parsed.Errors.Count > 0 && parsed.Action is not (Help or VersionAction)
                ? WrongUsage(root, parsed, error)
                : await parsed.InvokeAsync(Configuration(output, error), cancellationToken);
        }
        catch (InputException exception)
        {
            terminal.Complain(exception);
            return ExitCodes.BadInput;
        }
        catch (OperationCanceledException)
        {
            await error.WriteLineAsync("Interrupted.");
            return ExitCodes.Interrupted;
        }
        catch (OutOfMemoryException)
        {
            await error.WriteLineAsync("The memory of this machine ended the work.");
            return ExitCodes.BudgetEnded;
        }
#pragma warning disable CA1031 // Whatever else goes wrong is a fault of ours, and must not greet the user with a stack trace.
        catch (Exception exception)
#pragma warning restore CA1031
        {
            await error.WriteLineAsync($"This is a fault of fusecraft, not yours: {exception.GetType().Name}: {exception.Message.ReplaceLineEndings(" ")}");
            return ExitCodes.Fault;
        }
    }

    private static RootCommand Root(Terminal terminal)
    {
        var root = new RootCommand("Examines puzzles whose turns are sometimes blocked: their shapes, exact numbers of states, what loops can do, and ways home.")
        {
            HelpName = "fusecraft",
        };
        root.Add(NewCommand.Create(terminal));
        root.Add(SchemaCommand.Create(terminal));
        root.Add(CheckCommand.Create(terminal));
        root.Add(ExamineCommand.Create(terminal));
        root.Add(CompareCommand.Create(terminal));
        root.Add(RouteCommand.Create(terminal));
        root.Add(SolveCommand.Create(terminal));
        root.Add(TraceCommand.Create(terminal));
        root.Add(DepthsCommand.Create(terminal));
        root.Add(ScrambleCommand.Create(terminal));
        root.Add(LoopsCommand.Create(terminal));
        root.Add(MixingCommand.Create(terminal));
        Help.Install(root);
        var version = root.Options.OfType<VersionOption>().Single();
        version.Description = "Shows the version.";
        version.Action = new VersionAction();
        return root;
    }

    private static InvocationConfiguration Configuration(TextWriter output, TextWriter error) => new()
    {
        Output = output,
        Error = error,
        EnableDefaultExceptionHandler = false,
        ProcessTerminationTimeout = null,
    };

    private static int WrongUsage(RootCommand root, ParseResult parsed, TextWriter error)
    {
        var command = parsed.CommandResult.Command;
        string[] messages = command is RootCommand && parsed.UnmatchedTokens is [var unknown, ..]
            ? [$"There is no command '{unknown}'."]
            : [.. parsed.Errors.Select(problem => problem.Message).Distinct()];
        foreach (var message in messages)
        {
            error.WriteLine(message);
        }

        error.WriteLine();
        root.Parse(command is RootCommand ? ["--help"] : [command.Name, "--help"]).Invoke(Configuration(error, error));
        return ExitCodes.Usage;
    }

    private sealed class VersionAction : SynchronousCommandLineAction
    {
        public override int Invoke(ParseResult parseResult)
        {
            // What follows a plus sign names the commit, which users need not read.
            var version = typeof(Cli).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion;
            parseResult.InvocationConfiguration.Output.WriteLine($"fusecraft {version.Split('+')[0]}");
            return ExitCodes.Done;
        }
    }
}
