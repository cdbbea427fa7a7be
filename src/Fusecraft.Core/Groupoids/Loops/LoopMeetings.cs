namespace Fusecraft.Groupoids;

/// <summary>
/// Brings together paths out from the base and paths back to it that meet in a vertex, so that every loop is tried, or is a product of loops tried and their inverses.
/// </summary>
/// <remarks>
/// As soon as a vertex has been reached by a path p and left by a path r, the loops p·r for all others there need not be tried with each other: once p'·r and p·r' are known, p'·r' = (p'·r)(p·r)⁻¹(p·r').
/// </remarks>
internal sealed class LoopMeetings
{
    private readonly Dictionary<int, (int Out, int Back)> _pairs = [];
    private readonly Dictionary<int, List<int>> _waitingOut = [];
    private readonly Dictionary<int, List<int>> _waitingBack = [];
    private readonly Action<int, int> _tryLoop;

    /// <param name="tryLoop">Told the path out and the path back that make a loop.</param>
    public LoopMeetings(Action<int, int> tryLoop) => _tryLoop = tryLoop;

    public void AddOut(int path, int vertex)
    {
        if (_pairs.TryGetValue(vertex, out var pair))
        {
            _tryLoop(path, pair.Back);
        }
        else if (_waitingBack.Remove(vertex, out var back))
        {
            back.ForEach(other => _tryLoop(path, other));
            _pairs.Add(vertex, (path, back[0]));
        }
        else
        {
            Wait(_waitingOut, path, vertex);
        }
    }

    public void AddBack(int path, int vertex)
    {
        if (_pairs.TryGetValue(vertex, out var pair))
        {
            _tryLoop(pair.Out, path);
        }
        else if (_waitingOut.Remove(vertex, out var there))
        {
            there.ForEach(other => _tryLoop(other, path));
            _pairs.Add(vertex, (there[0], path));
        }
        else
        {
            Wait(_waitingBack, path, vertex);
        }
    }

    private static void Wait(Dictionary<int, List<int>> waiting, int path, int vertex)
    {
        if (waiting.TryGetValue(vertex, out var paths))
        {
            paths.Add(path);
        }
        else
        {
            waiting.Add(vertex, [path]);
        }
    }
}
