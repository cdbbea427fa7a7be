namespace Fusecraft.Groupoids;

/// <summary>
/// Lifts the components of the quotient graph to regions. With <c>v(r)</c> the product of the inverse voltages along a path to representative <c>r</c>, the shapes over <c>r</c> that can be reached
/// are <c>r·y</c> for <c>y</c> in <c>v(r)·Y</c>, one set <c>Y</c> of symmetries for each component. The voltages around closed paths and the stabilizers generate the component's group <c>K</c>, and
/// <c>Y</c> is a union of cosets <c>K·y</c>, one for each region.
/// </summary>
/// <remarks>Source of voltages: J. L. Gross, T. W. Tucker, <em>Topological Graph Theory</em> (1987), chapter 2 (from memory). Components: Tarjan 1972.</remarks>
internal sealed class QuotientRegions
{
    private readonly OrbitExplorer _explorer;
    private readonly SymmetryTable _table;
    private int[]? _componentOf;
    private ushort[] _labels = [];
    private Component[] _components = [];

    public QuotientRegions(OrbitExplorer explorer)
    {
        _explorer = explorer;
        _table = explorer.Table;
    }

    /// <summary>The components of the quotient; number 0 is that of home.</summary>
    public IReadOnlyList<Component> Components => _components;

    public int ComponentOf(int representative) => _componentOf is null ? 0 : _componentOf[representative];

    /// <summary>The <c>v(r)</c> of a representative, from the root of its component.</summary>
    public int LabelOf(int representative) => _labels[representative];

    public void Run()
    {
        if (_explorer.Mechanism.IsReversible)
        {
            RunReversible();
        }
        else
        {
            RunDirected();
        }
    }

    // Everything is one component, and its group grows while the search goes on, so that no arc need be kept.
    private void RunReversible()
    {
        var group = new SymmetrySubset(_table);
        var labels = new List<ushort> { 0 };
        _explorer.Run(arc =>
        {
            var label = _table.Product(_table.Inverse(arc.Voltage), labels[arc.From]);
            if (arc.To == labels.Count)
            {
                labels.Add((ushort)label);
            }
            else
            {
                group.Add(_table.Product(_table.Inverse(labels[arc.To]), label));
            }
        });
        _labels = [.. labels];
        for (var representative = 0; representative < _explorer.Count; representative++)
        {
            AddStabilizer(group, representative);
        }

        _components = [new Component(0, group)];
        Reach(_components[0], _table.Inverse(_explorer.HomeVoltage));
    }

    private void RunDirected()
    {
        _explorer.Run(null);
        var graph = new Adjacency(_explorer.Count, _explorer.Arcs!);
        _componentOf = graph.StrongComponents(out var count);
        _labels = new ushort[_explorer.Count];
        _components = new Component[count];
        var isLabelled = new bool[_explorer.Count];
        var inside = new Adjacency(_explorer.Count, _explorer.Arcs!.FindAll(arc => _componentOf[arc.From] == _componentOf[arc.To]));
        for (var root = 0; root < _explorer.Count; root++)
        {
            if (_components[_componentOf[root]] is null)
            {
                var group = new SymmetrySubset(_table);
                _components[_componentOf[root]] = new Component(root, group);
                Label(root, group, inside, isLabelled);
            }
        }

        // Components are numbered so that passages lead to larger numbers only.
        Reach(_components[0], _table.Inverse(_explorer.HomeVoltage));
        var passages = _explorer.Arcs.FindAll(arc => _componentOf[arc.From] != _componentOf[arc.To]).OrderBy(arc => _componentOf[arc.From]);
        foreach (var arc in passages)
        {
            var across = _table.Product(_table.Product(_table.Inverse(_labels[arc.To]), _table.Inverse(arc.Voltage)), _labels[arc.From]);
            var target = _components[_componentOf[arc.To]];
            foreach (var lift in _components[_componentOf[arc.From]].Lifts)
            {
                Reach(target, _table.Product(across, lift));
            }
        }
    }

    private void Label(int root, SymmetrySubset group, Adjacency inside, bool[] isLabelled)
    {
        isLabelled[root] = true;
        var members = new List<int> { root };
        for (var i = 0; i < members.Count; i++)
        {
            AddStabilizer(group, members[i]);
            foreach (var arc in inside.From(members[i]))
            {
                var label = _table.Product(_table.Inverse(arc.Voltage), _labels[arc.From]);
                if (!isLabelled[arc.To])
                {
                    isLabelled[arc.To] = true;
                    _labels[arc.To] = (ushort)label;
                    members.Add(arc.To);
                }
                else
                {
                    group.Add(_table.Product(_table.Inverse(_labels[arc.To]), label));
                }
            }
        }
    }

    private void AddStabilizer(SymmetrySubset group, int representative)
    {
        if (_explorer.StabilizerOrder(representative) == 1)
        {
            return;
        }

        var label = _labels[representative];
        foreach (var member in _table.Stabilizer(_explorer.Key(representative).ToArray()))
        {
            group.Add(_table.Product(_table.Product(_table.Inverse(label), member), label));
        }
    }

    // Adds the whole coset of a lift.
    private void Reach(Component component, int lift)
    {
        if (component.IsReached(lift))
        {
            return;
        }

        component.RegionCount++;
        foreach (var member in component.Group.Members)
        {
            component.Add(_table.Product(member, lift));
        }
    }

    /// <summary>A component of the quotient and the regions over it.</summary>
    internal sealed class Component(int root, SymmetrySubset group)
    {
        private readonly HashSet<int> _reached = [];

        public int Root { get; } = root;

        /// <summary>The symmetries that keep the region of the root.</summary>
        public SymmetrySubset Group { get; } = group;

        /// <summary>The reachable shapes over the root are its images under these.</summary>
        public IReadOnlyCollection<int> Lifts => _reached;

        /// <summary>How many reachable regions lie over it.</summary>
        public int RegionCount { get; set; }

        public bool IsReached(int lift) => _reached.Contains(lift);

        public void Add(int lift) => _reached.Add(lift);
    }

    /// <summary>Arcs by where they start.</summary>
    private sealed class Adjacency
    {
        private readonly int[] _starts;
        private readonly QuotientArc[] _arcs;

        // The arcs come in the order of their starts.
        public Adjacency(int count, List<QuotientArc> arcs)
        {
            _arcs = [.. arcs];
            _starts = new int[count + 1];
            foreach (var arc in arcs)
            {
                _starts[arc.From + 1]++;
            }

            for (var i = 0; i < count; i++)
            {
                _starts[i + 1] += _starts[i];
            }
        }

        public ReadOnlySpan<QuotientArc> From(int representative) => _arcs.AsSpan(_starts[representative], _starts[representative + 1] - _starts[representative]);

        /// <summary>Numbers the strongly connected components so that arcs between them lead to larger numbers; all can be reached from representative 0.</summary>
        public int[] StrongComponents(out int components)
        {
            var count = _starts.Length - 1;
            var order = new int[count];
            var low = new int[count];
            var component = new int[count];
            Array.Fill(component, -1);
            var open = new Stack<int>();
            var path = new Stack<(int Node, int NextArc)>([(0, 0)]);
            var visited = 0;
            components = 0;
            while (path.TryPop(out var top))
            {
                var (node, next) = top;
                if (next == 0)
                {
                    order[node] = low[node] = ++visited;
                    open.Push(node);
                }

                var arcs = From(node);
                while (next < arcs.Length && order[arcs[next].To] != 0)
                {
                    if (component[arcs[next].To] < 0)
                    {
                        low[node] = Math.Min(low[node], order[arcs[next].To]);
                    }

                    next++;
                }

                if (next < arcs.Length)
                {
                    path.Push((node, next + 1));
                    path.Push((arcs[next].To, 0));
                    continue;
                }

                if (low[node] == order[node])
                {
                    int member;
                    do
                    {
                        member = open.Pop();
                        component[member] = components;
                    }
                    while (member != node);
                    components++;
                }

                if (path.TryPeek(out var parent))
                {
                    low[parent.Node] = Math.Min(low[parent.Node], low[node]);
                }
            }

            // Tarjan's search finishes a component after all that it leads to.
            for (var node = 0; node < count; node++)
            {
                component[node] = components - 1 - component[node];
            }

            return component;
        }
    }
}
