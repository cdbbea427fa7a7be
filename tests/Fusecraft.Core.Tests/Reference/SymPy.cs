using System.ComponentModel;
using System.Diagnostics;

namespace Fusecraft.Tests.Reference;

/// <summary>Runs Python scripts that need SymPy with the first interpreter found that has it.</summary>
internal static class SymPy
{
    private const string Variable = "FUSECRAFT_PYTHON";
    private static readonly TimeSpan _patience = TimeSpan.FromMinutes(10);
    private static readonly string[] _candidates = Environment.GetEnvironmentVariable(Variable) is { Length: > 0 } chosen ? [chosen] : ["python3", "/usr/bin/python3", "python"];
    private static readonly Lazy<string?> _interpreter = new(() => Array.Find(_candidates, HasSymPy));

    /// <summary>Why no script can run; null when one can.</summary>
    public static string? WhyMissing => _interpreter.Value is not null
        ? null
        : $"No Python with SymPy was found; tried: {string.Join(", ", _candidates)}. Install python3-sympy (Debian, Ubuntu) or sympy (pip), or name an interpreter in {Variable}.";

    /// <summary>Runs a script that must succeed on some standard input, and gives what it wrote to its standard output.</summary>
    public static string Run(string script, string input)
    {
        var (exitCode, output, error) = Start(_interpreter.Value ?? throw new InvalidOperationException(WhyMissing), input, script);
        return exitCode == 0 ? output : throw new InvalidOperationException($"{script} exited with {exitCode}:\n{error}");
    }

    private static bool HasSymPy(string interpreter)
    {
        try
        {
            return Start(interpreter, "", "-c", "import sympy.combinatorics").ExitCode == 0;
        }
        catch (Win32Exception)
        {
            // There is no such program.
            return false;
        }
    }

    private static (int ExitCode, string Output, string Error) Start(string program, string input, params string[] arguments)
    {
        using var process = Process.Start(new ProcessStartInfo(program, arguments) { RedirectStandardInput = true, RedirectStandardOutput = true, RedirectStandardError = true })!;
        var output = process.StandardOutput.ReadToEndAsync();
        var error = process.StandardError.ReadToEndAsync();
        try
        {
            process.StandardInput.Write(input);
            process.StandardInput.Close();
        }
        catch (IOException)
        {
            // It ended before it read everything; its exit code and error output say why.
        }

        if (!process.WaitForExit(_patience))
        {
            process.Kill(entireProcessTree: true);
            throw new TimeoutException($"{program} {string.Join(' ', arguments)} did not end within {_patience}.");
        }

        return (process.ExitCode, output.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }
}
