using Fusecraft.Mechanisms;

namespace Fusecraft.Cli;

/// <summary>Mechanisms, states and words as users give them: every mistake becomes an <see cref="InputException"/> that names the file or option.</summary>
internal static class MechanismInput
{
    public static Mechanism Load(string path)
    {
        try
        {
            return MechanismFile.Load(path);
        }
        catch (MechanismFormatException exception)
        {
            throw new InputException(Problems(path, exception));
        }
        catch (Exception exception) when (exception is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new InputException($"{path}: there is no such file");
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            throw new InputException(Directory.Exists(path) ? $"{path}: this is a folder, not a file" : $"{path}: the file cannot be read: {exception.Message}");
        }
    }

    /// <summary>Loads a mechanism and fuses more blocks into it, each given as names of pieces with spaces between.</summary>
    public static Mechanism Load(string path, IReadOnlyCollection<string> moreBlocks)
    {
        var mechanism = Load(path);
        if (moreBlocks.Count == 0)
        {
            return mechanism;
        }

        var definition = mechanism.Definition;
        foreach (var block in moreBlocks)
        {
            definition = definition.WithBlock(block.Split(' ', StringSplitOptions.RemoveEmptyEntries));
        }

        return Checked($"{path} with the blocks of --with-block", () => Mechanism.Create(definition));
    }

    /// <summary>Does work that may find out a mistake of the mechanism which loading cannot see.</summary>
    public static T Checked<T>(string path, Func<T> work)
    {
        try
        {
            return work();
        }
        catch (MechanismFormatException exception)
        {
            throw new InputException(Problems(path, exception));
        }
    }

    public static State State(Mechanism mechanism, string option, string text)
    {
        try
        {
            return mechanism.ParseState(text);
        }
        catch (FormatException exception)
        {
            throw new InputException($"{option}: {exception.Message}");
        }
    }

    public static Word Word(Mechanism mechanism, string option, string text) =>
        mechanism.TryParseWord(text, out var word, out var problem) ? word : throw new InputException($"{option}: \"{text}\" is no word of {mechanism.Name}: {problem}");

    public static ColouredState Colours(Mechanism mechanism, string option, string text) =>
        mechanism.TryParseColours(text, out var colours, out var problem) ? colours : throw new InputException($"{option}: \"{text}\" does not colour {mechanism.Name}: {problem}");

    private static string Problems(string path, MechanismFormatException exception) =>
        string.Join('\n', exception.Problems.Select(problem => $"{path}: {problem}"));
}
