using System.Collections.Immutable;
using System.Diagnostics;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Finds a loop basis: tries all loops by length, as a path out and a path back that meet halfway, and keeps those that the ones kept before do not generate. When the states run out, the loops over single arcs with
/// shortest ways there and back follow, by length too; those generate the group for certain.
/// </summary>
internal sealed class LoopBasisSearch<T>
    where T : unmanaged, IBinaryInteger<T>
{
    /// <summary>So many copies of one loop are looked at.</summary>
    private const int MaxCopies = 10_000;

    /// <summary>States held at most, times the lanes of each.</summary>
    private const int MaxLanes = 1 << 29;
    private readonly VertexGroup _group;
    private readonly ImmutableArray<MechanismSymmetry> _symmetries;
    private readonly CancellationToken _cancellation;
    private readonly int _maxStates;
    private readonly RegionGraph _graph;
    private readonly int _root;
    private readonly ChainBuilder<T> _builder;
    private readonly PackedPermutations<T> _labels;
    private readonly PackedPermutations<T> _inverses;
    private readonly LoopStates<T> _ahead;
    private readonly LoopStates<T> _behind;
    private readonly List<TurnPath> _kept = [];
    private readonly T[] _inverse;
    private readonly T[] _loop;

    public LoopBasisSearch(VertexGroup group, SymmetryGroup symmetries, int maxStates, CancellationToken cancellation)
    {
        _group = group;
        _symmetries = symmetries.Generators;
        _cancellation = cancellation;
        _graph = group.Groupoid.GraphOf(group.Region.Index, null, cancellation);
        _root = _graph.Place(group.BaseShape);
        var mechanism = group.Groupoid.Mechanism;
        _builder = new ChainBuilder<T>(mechanism.SiteCount, default, group.Order);
        _maxStates = Math.Min(maxStates, MaxLanes / _builder.Stride);
        _labels = new PackedPermutations<T>(_builder.Stride, Math.Max(1, mechanism.Steps.Length));
        _inverses = new PackedPermutations<T>(_builder.Stride, Math.Max(1, mechanism.Steps.Length));
        foreach (var step in mechanism.Steps)
        {
            step.Permutation.CopyLanes(_labels.AddRow());
            step.Permutation.Inverse().CopyLanes(_inverses.AddRow());
        }

        _ahead = new LoopStates<T>(_root, _graph.Out, _labels);
        _behind = _graph.IsReversible ? _ahead : new LoopStates<T>(_root, _graph.In, _inverses);
        _inverse = new T[_builder.Stride];
        _loop = new T[_builder.Stride];
    }

    private bool IsDone => _builder.Order == _group.Order;

    public LoopBasis Run()
    {
        var covered = TryAllLoops();
        var proven = IsDone ? _kept.Select(loop => loop.Length).DefaultIfEmpty(0).Max() : covered + 1;
        if (!IsDone)
        {
            TryTreeLoops(covered);
        }

        DropSuperfluous();
        ImmutableArray<BasisLoop> loops = [.. _kept.Select(path => new BasisLoop(path))];
        return new LoopBasis(_group, loops, Families(loops), proven);
    }

    // Until the group is generated, or the states run out: then gives the length up to which all loops have been tried.
    private int TryAllLoops()
    {
        var meetings = new LoopMeetings(TryMeeting);
        meetings.AddOut(0, _root);
        meetings.AddBack(0, _root);
        for (var half = 1; !IsDone; half++)
        {
            if (_ahead.IsExhausted && _behind.IsExhausted)
            {
                throw new UnreachableException("All loops together do not generate the vertex group.");
            }

            if (!_ahead.TryGrow(_maxStates, _cancellation))
            {
                return (2 * half) - 2;
            }

            for (var state = _ahead.LastLevel; state < _ahead.Count && !IsDone; state++)
            {
                meetings.AddOut(state, _ahead.Vertex(state));
            }

            if (!IsDone && _behind != _ahead && !_behind.TryGrow(_maxStates, _cancellation))
            {
                return (2 * half) - 1;
            }

            for (var state = _behind.LastLevel; state < _behind.Count && !IsDone; state++)
            {
                meetings.AddBack(state, _behind.Vertex(state));
            }
        }

        return int.MaxValue;
    }

    private void TryMeeting(int there, int back)
    {
        Lanes.InvertPadded<T>(_behind[back], _inverse);
        Lanes.ComposePadded<T>(_ahead[there], _inverse, _loop);
        if (IsNew())
        {
            // The path back was found from its end.
            var steps = _ahead.PathTo(there).ConvertAll(arc => StepAt(arc.Vertex, arc.Label));
            var home = _behind.PathTo(back).ConvertAll(arc => StepAt(arc.End, LabelFromEnd(arc.Label)));
            home.Reverse();
            Keep([.. steps, .. home]);
        }
    }

    // Loops over an arc s -> s' by shortest ways to s and from s', longer than those that have all been tried. With the loops over the arcs of the two trees themselves these generate every loop.
    private void TryTreeLoops(int covered)
    {
        var there = new LoopTree(_root, _graph.Out);
        var back = _graph.IsReversible ? there : new LoopTree(_root, _graph.In);
        for (var length = covered + 1; length <= there.Depth + 1 + back.Depth && !IsDone; length++)
        {
            foreach (var vertex in there.Order)
            {
                _cancellation.ThrowIfCancellationRequested();
                var hasPath = false;
                for (var arc = _graph.Out.Start(vertex); arc < _graph.Out.Start(vertex + 1) && !IsDone; arc++)
                {
                    var end = _graph.Out.Ends[arc];
                    if (there.Distance(vertex) + 1 + back.Distance(end) != length)
                    {
                        continue;
                    }

                    if (!hasPath)
                    {
                        Lanes.Identity<T>(_inverse);
                        for (var at = vertex; at != _root; at = there.Parent(at))
                        {
                            Lanes.ComposePadded<T>(_inverse, _inverses[there.Label(at)], _inverse);
                        }

                        hasPath = true;
                    }

                    Lanes.InvertPadded<T>(_inverse, _loop);
                    Lanes.ComposePadded<T>(_loop, _labels[_graph.Out.Labels[arc]], _loop);
                    for (var at = end; at != _root; at = back.Parent(at))
                    {
                        Lanes.ComposePadded<T>(_loop, _labels[LabelFromEnd(back.Label(at))], _loop);
                    }

                    if (IsNew())
                    {
                        Keep(StepsOver(there, back, vertex, arc));
                    }
                }
            }
        }
    }

    private List<Step> StepsOver(LoopTree there, LoopTree back, int vertex, int arc)
    {
        var steps = new List<Step>();
        for (var at = vertex; at != _root; at = there.Parent(at))
        {
            steps.Add(StepAt(there.Parent(at), there.Label(at)));
        }

        steps.Reverse();
        steps.Add(StepAt(vertex, _graph.Out.Labels[arc]));
        for (var at = _graph.Out.Ends[arc]; at != _root; at = back.Parent(at))
        {
            steps.Add(StepAt(at, LabelFromEnd(back.Label(at))));
        }

        return steps;
    }

    private bool IsNew()
    {
        if (_builder.Contains(_loop))
        {
            return false;
        }

        _builder.Complete(_cancellation);
        return !_builder.Contains(_loop);
    }

    // Keeps a loop, and those of its copies under symmetries that the ones kept do not generate; they are as long.
    private void Keep(List<Step> steps)
    {
        var shape = _group.Groupoid.ShapeAt(_group.BaseShape);
        var copies = new List<TurnPath> { TurnPath.Follow(shape, steps) };
        var seen = new HashSet<Permutation> { copies[0].Permutation };
        for (var i = 0; i < copies.Count && !IsDone; i++)
        {
            Load(copies[i].Permutation);
            if (IsNew())
            {
                Add(copies[i]);
            }

            foreach (var symmetry in _symmetries)
            {
                if (copies.Count < MaxCopies && seen.Add(copies[i].Permutation.ConjugateBy(symmetry.Sites)))
                {
                    copies.Add(TurnPath.Follow(shape, copies[i].Steps.Select(symmetry.Image)));
                }
            }
        }
    }

    private void Add(TurnPath loop)
    {
        Load(loop.Permutation);
        _builder.Add(_loop, _cancellation);
        _builder.Complete(_cancellation);
        _kept.Add(loop);
    }

    private void Load(Permutation permutation) => permutation.CopyLanes(_loop.AsSpan());

    private void DropSuperfluous()
    {
        for (var i = _kept.Count - 1; i >= 0 && _kept.Count > 1; i--)
        {
            var others = PermutationGroup.Generate(_kept.Where((_, other) => other != i).Select(loop => loop.Permutation), _group.Group.Degree);
            if (StabilizerChain.Build(others, new ChainOptions { OrderBound = _group.Order }, _cancellation).Order == _group.Order)
            {
                _kept.RemoveAt(i);
            }
        }
    }

    private ImmutableArray<LoopFamily> Families(ImmutableArray<BasisLoop> loops)
    {
        var families = new List<(List<BasisLoop> Loops, HashSet<Permutation> Copies)>();
        foreach (var loop in loops)
        {
            var at = families.FindIndex(family => family.Copies.Contains(loop.Permutation));
            if (at < 0)
            {
                at = families.Count;
                families.Add(([], Copies(loop.Permutation)));
            }

            families[at].Loops.Add(loop);
        }

        return [.. families.Select(family => new LoopFamily([.. family.Loops], family.Copies.Count < MaxCopies ? family.Copies.Sum(copy => copy == copy.Inverse() ? 2 : 1) / 2 : null))];
    }

    // The images of a permutation and of its inverse under the symmetries.
    private HashSet<Permutation> Copies(Permutation permutation)
    {
        var queue = new Queue<Permutation>([permutation, permutation.Inverse()]);
        HashSet<Permutation> copies = [.. queue];
        while (copies.Count < MaxCopies && queue.TryDequeue(out var copy))
        {
            foreach (var symmetry in _symmetries)
            {
                var image = copy.ConjugateBy(symmetry.Sites);
                if (copies.Add(image))
                {
                    queue.Enqueue(image);
                }
            }
        }

        return copies;
    }

    private Step StepAt(int vertex, int label) => _graph.ArrowWith(vertex, label).Step;

    // Arcs by their ends are in a table of their own, or in that by their sources, as what undoes them.
    private int LabelFromEnd(int label) => _graph.IsReversible ? _graph.InverseLabel[label] : label;
}
