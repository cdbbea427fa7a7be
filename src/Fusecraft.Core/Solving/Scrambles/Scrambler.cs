using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Draws states of the home region, each with the same probability, and searches words that make them: a uniform shape and a uniform member of the vertex group, never a random walk. With a bound on the distance, each
/// state within it has the same probability.
/// </summary>
/// <remarks>
/// The same seed draws the same states within a major version, whatever the machine; the words for them may get shorter. Each draw goes on with the random numbers where the last one ended. Safe to share between
/// threads, each with random numbers of its own.
/// </remarks>
public sealed class Scrambler
{
    /// <summary>Fewer states than this are listed once, and one of the list is drawn; from more, states are drawn until one is within the bounds.</summary>
    private const int MostListed = 100_000;

    private readonly VertexGroup _group;
    private readonly int[] _shapes;
    private readonly DistanceTable? _table;
    private readonly Lazy<State[]?> _listed;
    private readonly Solver _solver;
    private readonly int _greatest;

    private Scrambler(VertexGroup group, ScrambleOptions options, DistanceTable? table)
    {
        _group = group;
        _table = table;
        _greatest = options.GreatestDistance ?? int.MaxValue;
        Options = options;
        _shapes = [.. Enumerable.Range(0, group.Groupoid.ShapeCount).Where(shape => group.Groupoid.RegionOf(shape) == 0)];
        _solver = new Solver(group.Groupoid.Mechanism, options.Search);
        StateCount = table is null
            ? group.StateCount
            : Enumerable.Range(0, table.Counts.Length).Where(distance => distance >= options.LeastDistance && distance <= _greatest).Sum(distance => table.Counts[distance]);
        _listed = new Lazy<State[]?>(List);
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism => _group.Groupoid.Mechanism;

    /// <summary>Which states are drawn.</summary>
    public ScrambleOptions Options { get; }

    /// <summary>The number of states that are drawn from.</summary>
    public BigInteger StateCount { get; }

    /// <summary>Makes ready to draw states of a mechanism: explores it, and makes a distance table where distances are asked for.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="options">Which states to draw; null for all of the home region.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">No state lies within the bounds on the distance, or the metric weighs a turn that the mechanism does not have.</exception>
    /// <exception cref="InvalidOperationException">A distance table would take more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static Scrambler Of(Mechanism mechanism, ScrambleOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        options ??= ScrambleOptions.Default;
        ArgumentOutOfRangeException.ThrowIfNegative(options.LeastDistance, nameof(options));
        options.Metric.RequireTurnsOf(mechanism, nameof(options));
        var group = ShapeGroupoid.Explore(mechanism, cancellationToken: cancellationToken).VertexGroupAt(0, cancellationToken);
        if (options is { LeastDistance: 0, GreatestDistance: null })
        {
            return new Scrambler(group, options, null);
        }

        var table = DistanceTable.Build(
            StateNumbering.Of(group), new DistanceOptions { Metric = options.Metric, Origin = DistanceOrigin.FromBase, MaxBytes = options.MaxBytes }, null, cancellationToken);
        return options.LeastDistance <= table.Greatest && options.LeastDistance <= (options.GreatestDistance ?? int.MaxValue)
            ? new Scrambler(group, options, table)
            : throw new ArgumentException(
                $"No state of {mechanism.Name} is at a distance of at least {options.LeastDistance}{(options.GreatestDistance is { } most ? $" and at most {most}" : "")}; the greatest is {table.Greatest}.", nameof(options));
    }

    /// <summary>Draws a state.</summary>
    /// <param name="random">The random numbers.</param>
    public State NextState(SeededRandom random)
    {
        ArgumentNullException.ThrowIfNull(random);
        if (_table is null)
        {
            return Draw(random);
        }

        if (_listed.Value is { } listed)
        {
            return listed[random.NextInt32(listed.Length)];
        }

        while (true)
        {
            var state = Draw(random);
            if (IsWithin(_table.DistanceOf(state)))
            {
                return state;
            }
        }
    }

    /// <summary>Draws a state and searches a word that makes it: a shortest one where there is a distance table.</summary>
    /// <param name="random">The random numbers.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public Scramble Next(SeededRandom random, CancellationToken cancellationToken = default)
    {
        var state = NextState(random);
        return new Scramble(state, _table is not null ? _table.ShortestPath(state) : _solver.Route(Mechanism.HomeState, state, null, cancellationToken).Path);
    }

    private State Draw(SeededRandom random)
    {
        var shape = _shapes[random.NextInt32(_shapes.Length)];
        return Mechanism.StateOf(_group.Group.RandomElement(random) * _group.TreePath(shape).Permutation);
    }

    private bool IsWithin(int distance) => distance >= Options.LeastDistance && distance <= _greatest;

    // In the order of their image lists, which does not depend on how states are numbered.
    private State[]? List()
    {
        if (StateCount >= MostListed)
        {
            return null;
        }

        var states = Enumerable.Range(Options.LeastDistance, Math.Min(_greatest, _table!.Greatest) - Options.LeastDistance + 1).SelectMany(_table.StatesAt).ToArray();
        var sites = Mechanism.SiteCount;
        Array.Sort(states, (a, b) =>
        {
            var site = 0;
            while (site < sites && a.Labels[site] == b.Labels[site])
            {
                site++;
            }

            return site == sites ? 0 : a.Labels[site].CompareTo(b.Labels[site]);
        });
        return states;
    }
}
