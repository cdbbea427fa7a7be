using System.Runtime.Intrinsics;

namespace Fusecraft.Groupoids;

/// <summary>
/// The diameter of a strongly connected graph. A search from w forwards and backwards bounds the eccentricity of every vertex u from above by d(u, w) + ecc(w) and from below by d(u, w) and by
/// ecc(w) - d(w, u); a vertex whose upper bound does not exceed a distance already seen need not be searched from. Once such searches rule out too few, the vertices left are searched from 256 at a time.
/// </summary>
internal sealed class DiameterSearch
{
    /// <summary>So many searches in a row must halve the number of open vertices, or many are searched from at once.</summary>
    private const int SearchesToHalve = 6;
    private const int Lanes = 256;
    private readonly ArcTable _out;
    private readonly ArcTable _in;
    private readonly long _maxArcsSeen;
    private readonly Action<DiameterBounds>? _report;
    private readonly CancellationToken _cancellation;
    private readonly int[] _upper;
    private readonly int[] _lower;
    private readonly int[] _there;
    private readonly int[] _back;
    private readonly int[] _queue;
    private DiameterBounds _bounds = new(-1, int.MaxValue, 0, 0);
    private long _arcsSeen;

    public DiameterSearch(ArcTable forward, ArcTable backward, long maxArcsSeen, Action<DiameterBounds>? report, CancellationToken cancellation)
    {
        _out = forward;
        _in = backward;
        _maxArcsSeen = maxArcsSeen;
        _report = report;
        _cancellation = cancellation;
        var count = forward.VertexCount;
        _upper = new int[count];
        Array.Fill(_upper, int.MaxValue);
        _lower = new int[count];
        _there = new int[count];
        _back = ReferenceEquals(forward, backward) ? _there : new int[count];
        _queue = new int[count];
    }

    public DiameterBounds Run()
    {
        var open = SearchFrom(0);
        for (var (searches, openBefore) = (1, open); open > 0 && _arcsSeen < _maxArcsSeen; searches++)
        {
            if (searches % SearchesToHalve == 0)
            {
                if (2L * open > openBefore)
                {
                    break;
                }

                openBefore = open;
            }

            open = SearchFrom(Next(central: searches % 2 == 0));
        }

        if (open > 0)
        {
            SearchFromMany();
        }

        return _bounds;
    }

    // Searches from a vertex both ways; gives the number of vertices whose eccentricity may exceed the largest distance seen.
    private int SearchFrom(int vertex)
    {
        _cancellation.ThrowIfCancellationRequested();
        var eccentricity = _out.Search(vertex, _there, _queue, out var found);
        Raise(eccentricity, vertex, _queue[found - 1]);
        _arcsSeen += _out.ArcCount;
        if (!ReferenceEquals(_out, _in))
        {
            var back = _in.Search(vertex, _back, _queue, out found);
            Raise(back, _queue[found - 1], vertex);
            _arcsSeen += _in.ArcCount;
        }

        var (open, most) = (0, _bounds.Lower);
        for (var u = 0; u < _upper.Length; u++)
        {
            _upper[u] = Math.Min(_upper[u], _back[u] + eccentricity);
            _lower[u] = Math.Max(_lower[u], Math.Max(_back[u], eccentricity - _there[u]));
            open += _upper[u] > _bounds.Lower ? 1 : 0;
            most = Math.Max(most, _upper[u]);
        }

        Lower(most);
        return open;
    }

    // By turns the open vertex that may be farthest out, and one that may be most central, whose search bounds the others well.
    private int Next(bool central)
    {
        var best = -1;
        for (var u = 0; u < _upper.Length; u++)
        {
            if (_upper[u] > _bounds.Lower && (best < 0 || (central ? _lower[u] < _lower[best] : _upper[u] > _upper[best])))
            {
                best = u;
            }
        }

        return best;
    }

    private void SearchFromMany()
    {
        var open = new List<int>();
        for (var u = 0; u < _upper.Length; u++)
        {
            if (_upper[u] > _bounds.Lower)
            {
                open.Add(u);
            }
        }

        // Those that may be farthest out first; the vertices after them are bounded by the first one not searched from.
        open.Sort((one, other) => _upper[one] != _upper[other] ? _upper[other].CompareTo(_upper[one]) : one.CompareTo(other));
        var (seen, frontier, next) = (new Vector256<ulong>[_upper.Length], new Vector256<ulong>[_upper.Length], new Vector256<ulong>[_upper.Length]);
        for (var at = 0; at < open.Count && _upper[open[at]] > _bounds.Lower && _arcsSeen < _maxArcsSeen;)
        {
            var count = Math.Min(Lanes, open.Count - at);
            SearchFromAll(open, at, count, seen, frontier, next);
            at += count;
            Lower(at == open.Count ? _bounds.Lower : Math.Max(_bounds.Lower, _upper[open[at]]));
        }
    }

    private void SearchFromAll(List<int> sources, int first, int count, Vector256<ulong>[] seen, Vector256<ulong>[] frontier, Vector256<ulong>[] next)
    {
        Array.Clear(seen);
        Array.Clear(frontier);
        for (var lane = 0; lane < count; lane++)
        {
            var source = sources[first + lane];
            frontier[source] = seen[source] |= Vector256<ulong>.Zero.WithElement(lane / 64, 1UL << (lane % 64));
        }

        var (last, lastLanes) = (sources[first], Vector256.Create(1UL, 0, 0, 0));
        var depth = -1;
        for (var isActive = true; isActive; depth++)
        {
            _cancellation.ThrowIfCancellationRequested();
            for (var v = 0; v < frontier.Length; v++)
            {
                if (frontier[v] == Vector256<ulong>.Zero)
                {
                    continue;
                }

                var ends = _out.EndsAt(v);
                _arcsSeen += ends.Length;
                foreach (var end in ends)
                {
                    next[end] |= frontier[v];
                }
            }

            isActive = false;
            for (var v = 0; v < frontier.Length; v++)
            {
                var fresh = Vector256.AndNot(next[v], seen[v]);
                next[v] = Vector256<ulong>.Zero;
                frontier[v] = fresh;
                if (fresh != Vector256<ulong>.Zero)
                {
                    seen[v] |= fresh;
                    (last, lastLanes) = (v, fresh);
                    isActive = true;
                }
            }
        }

        var word = Enumerable.Range(0, 4).First(i => lastLanes[i] != 0);
        Raise(depth, sources[first + (64 * word) + System.Numerics.BitOperations.TrailingZeroCount(lastLanes[word])], last);
    }

    private void Raise(int distance, int from, int to)
    {
        if (distance > _bounds.Lower)
        {
            _bounds = _bounds with { Lower = distance, From = from, To = to };
        }
    }

    private void Lower(int upper)
    {
        _bounds = _bounds with { Upper = upper };
        _report?.Invoke(_bounds);
    }
}
