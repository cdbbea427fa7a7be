using System.CommandLine;

namespace Fusecraft.Cli;

/// <summary>A command whose help ends with examples.</summary>
internal sealed class ExampleCommand : Command
{
    public ExampleCommand(string name, string description, params string[] examples)
        : base(name, description) => Examples = examples;

    public string[] Examples { get; }
}
