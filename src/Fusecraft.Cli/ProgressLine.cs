using System.Diagnostics;

namespace Fusecraft.Cli;

/// <summary>One line on the error stream that says how far long work has come; written only to a terminal, only when the work takes a while, and wiped at the end.</summary>
internal sealed class ProgressLine<T> : IProgress<T>, IDisposable
{
    private static readonly TimeSpan Patience = TimeSpan.FromMilliseconds(400);
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(100);
    private readonly Terminal _terminal;
    private readonly Func<T, string> _describe;
    private readonly Stopwatch _clock = Stopwatch.StartNew();
    private readonly Lock _gate = new();
    private TimeSpan _next = Patience;
    private int _written;

    public ProgressLine(Terminal terminal, Func<T, string> describe)
    {
        _terminal = terminal;
        _describe = describe;
    }

    public void Report(T value)
    {
        if (!_terminal.ShowsProgress)
        {
            return;
        }

        lock (_gate)
        {
            if (_clock.Elapsed >= _next)
            {
                _next = _clock.Elapsed + Pause;
                Show(_describe(value));
            }
        }
    }

    public void Dispose()
    {
        if (_written > 0)
        {
            Show("");
            _terminal.Error.Write('\r');
        }
    }

    // Blanks wipe what the last text left over, so no control codes are needed.
    private void Show(string text)
    {
        _terminal.Error.Write('\r' + text.PadRight(_written));
        _written = text.Length;
    }
}
