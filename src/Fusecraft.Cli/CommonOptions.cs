using System.CommandLine;
using System.Globalization;

namespace Fusecraft.Cli;

/// <summary>Arguments and options that several commands share.</summary>
internal static class CommonOptions
{
    public const string StateForms = "\"home\", a word from home in quotes, or cycles of sites such as \"(1 2 3)\"";

    public static Argument<string> File() => new("FILE") { Description = "The mechanism file." };

    public static Argument<string[]> Files() => new("FILE") { Description = "One or more mechanism files.", Arity = ArgumentArity.OneOrMore };

    public static Option<bool> Json(string what) => new("--json") { Description = what };

    public static Option<string> Text(string name, string valueName, string description) =>
        new(name) { Description = description, HelpName = valueName, Required = true };

    public static Option<string[]> WithBlock(string description) =>
        new("--with-block") { Description = description, HelpName = "PIECES", Arity = ArgumentArity.OneOrMore, AllowMultipleArgumentsPerToken = false };

    /// <summary>An option whose value is a whole number; anything else is wrong usage.</summary>
    public static Option<int?> Number(string name, int least, string description) => new(name)
    {
        Description = description,
        HelpName = "N",
        CustomParser = result =>
        {
            var text = result.Tokens.Count == 1 ? result.Tokens[0].Value : "";
            if (int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out var number) && number >= least)
            {
                return number;
            }

            result.AddError($"{name} takes a whole number from {least} to {int.MaxValue}; found \"{text}\".");
            return null;
        },
    };
}
