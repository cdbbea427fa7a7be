namespace Fusecraft.Permutations;

/// <summary>
/// Goes through the cycles of length two or more, each starting with its smallest point, in the order of those. All of them are handed out
/// in one reused buffer: a cycle is good until the next one is asked for. Time and memory are linear in the support end.
/// </summary>
internal ref struct CycleWalk
{
    private readonly Permutation _permutation;
    private readonly Scratch<bool> _seen;
    private readonly Scratch<int> _points;
    private int _start;
    private int _length;

    public CycleWalk(Permutation permutation)
    {
        _permutation = permutation;
        _seen = new Scratch<bool>(permutation.SupportEnd);
        _seen.Span.Clear();
        _points = new Scratch<int>(permutation.SupportEnd);
    }

    public readonly ReadOnlySpan<int> Current => _points.Span[.._length];

    public readonly CycleWalk GetEnumerator() => this;

    public bool MoveNext()
    {
        var seen = _seen.Span;
        var points = _points.Span;
        for (; _start < seen.Length; _start++)
        {
            if (seen[_start] || _permutation[_start] == _start)
            {
                continue;
            }

            _length = 0;
            for (var point = _start; !seen[point]; point = _permutation[point])
            {
                seen[point] = true;
                points[_length++] = point;
            }

            return true;
        }

        return false;
    }

    public readonly void Dispose()
    {
        _seen.Dispose();
        _points.Dispose();
    }
}
