namespace Fusecraft.Groupoids;

/// <summary>
/// For a directed graph and a root from which every vertex can be reached: v dominates w when every path from the root to w passes v. The dominators of a vertex form a chain, the last before itself being its
/// immediate dominator, so all of them form a tree.
/// </summary>
/// <remarks>Source: T. Lengauer, R. E. Tarjan, <em>A fast algorithm for finding dominators in a flowgraph</em>, ACM TOPLAS 1 (1979) (not opened, method from memory), with path compression alone: m log n.</remarks>
internal sealed class DominatorTree
{
    private readonly int[] _parents;
    private readonly int[] _firsts;
    private readonly int[] _sizes;

    /// <param name="root">The root.</param>
    /// <param name="arcs">The arcs by their sources.</param>
    /// <param name="reversed">The same arcs by their targets.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public DominatorTree(int root, ArcTable arcs, ArcTable reversed, CancellationToken cancellation)
    {
        Root = root;
        var (order, treeParents) = DepthFirst(root, arcs, cancellation);
        _parents = new Links(order, treeParents).Dominators(reversed, cancellation);

        // Numbers in which every subtree is a range; dominators come before what they dominate in depth-first order.
        _sizes = new int[order.Length];
        _firsts = new int[order.Length];
        var next = new int[order.Length];
        for (var i = order.Length - 1; i >= 0; i--)
        {
            _sizes[order[i]]++;
            if (i > 0)
            {
                _sizes[_parents[order[i]]] += _sizes[order[i]];
            }
        }

        next[root] = 1;
        for (var i = 1; i < order.Length; i++)
        {
            var above = _parents[order[i]];
            _firsts[order[i]] = next[above];
            next[above] += _sizes[order[i]];
            next[order[i]] = _firsts[order[i]] + 1;
        }
    }

    public int Root { get; }

    public int VertexCount => _parents.Length;

    /// <summary>The immediate dominator; -1 for the root.</summary>
    public int Parent(int vertex) => _parents[vertex];

    /// <summary>How many vertices a vertex dominates, itself included.</summary>
    public int Size(int vertex) => _sizes[vertex];

    /// <summary>True when every path from the root to the vertex passes the dominator, or they are the same.</summary>
    public bool Dominates(int dominator, int vertex) => _firsts[vertex] >= _firsts[dominator] && _firsts[vertex] < _firsts[dominator] + _sizes[dominator];

    private static (int[] Order, int[] Parents) DepthFirst(int root, ArcTable arcs, CancellationToken cancellation)
    {
        var count = arcs.VertexCount;
        var (order, parents, next) = (new int[count], new int[count], new int[count]);
        Array.Fill(parents, -1);
        Array.Fill(next, -1);
        order[0] = root;
        next[root] = arcs.Start(root);
        var found = 1;
        for (var vertex = root; vertex >= 0;)
        {
            if (next[vertex] == arcs.Start(vertex + 1))
            {
                cancellation.ThrowIfCancellationRequested();
                vertex = parents[vertex];
                continue;
            }

            var end = arcs.Ends[next[vertex]++];
            if (next[end] < 0)
            {
                next[end] = arcs.Start(end);
                parents[end] = vertex;
                order[found++] = end;
                vertex = end;
            }
        }

        return (order, parents);
    }

    /// <summary>The forest of the algorithm. Vertices are 1 … n here, in depth-first order; 0 is none.</summary>
    private sealed class Links
    {
        private readonly int[] _order;
        private readonly int[] _number;
        private readonly int[] _treeParent;
        private readonly int[] _ancestor;
        private readonly int[] _label;
        private readonly int[] _semi;
        private readonly int[] _path;

        public Links(int[] order, int[] treeParents)
        {
            var count = order.Length;
            _order = order;
            _number = new int[count];
            for (var i = 0; i < count; i++)
            {
                _number[order[i]] = i + 1;
            }

            _treeParent = new int[count + 1];
            for (var i = 1; i < count; i++)
            {
                _treeParent[i + 1] = _number[treeParents[order[i]]];
            }

            _ancestor = new int[count + 1];
            _label = [.. Enumerable.Range(0, count + 1)];
            _semi = [.. Enumerable.Range(0, count + 1)];
            _path = new int[count + 1];
        }

        public int[] Dominators(ArcTable reversed, CancellationToken cancellation)
        {
            var count = _order.Length;
            var (dominator, bucket, nextInBucket) = (new int[count + 1], new int[count + 1], new int[count + 1]);
            for (var w = count; w > 1; w--)
            {
                cancellation.ThrowIfCancellationRequested();
                foreach (var source in reversed.EndsAt(_order[w - 1]))
                {
                    _semi[w] = Math.Min(_semi[w], _semi[Evaluate(_number[source])]);
                }

                (nextInBucket[w], bucket[_semi[w]]) = (bucket[_semi[w]], w);
                _ancestor[w] = _treeParent[w];
                for (var v = bucket[_treeParent[w]]; v != 0; v = nextInBucket[v])
                {
                    var least = Evaluate(v);
                    dominator[v] = _semi[least] < _semi[v] ? least : _treeParent[w];
                }

                bucket[_treeParent[w]] = 0;
            }

            var parents = new int[count];
            parents[_order[0]] = -1;
            for (var w = 2; w <= count; w++)
            {
                if (dominator[w] != _semi[w])
                {
                    dominator[w] = dominator[dominator[w]];
                }

                parents[_order[w - 1]] = _order[dominator[w] - 1];
            }

            return parents;
        }

        // The vertex with the least semidominator on the linked path above v, v itself included, the end of the path not. Compresses the path.
        private int Evaluate(int v)
        {
            if (_ancestor[v] == 0)
            {
                return v;
            }

            var length = 0;
            for (var u = v; _ancestor[_ancestor[u]] != 0; u = _ancestor[u])
            {
                _path[length++] = u;
            }

            while (length > 0)
            {
                var u = _path[--length];
                if (_semi[_label[_ancestor[u]]] < _semi[_label[u]])
                {
                    _label[u] = _label[_ancestor[u]];
                }

                _ancestor[u] = _ancestor[_ancestor[u]];
            }

            return _label[v];
        }
    }
}
