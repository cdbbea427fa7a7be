using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Numbers the states of a region without gaps from 0: those that turn paths within the region reach from a base state, which is number 0. The base state of the home region is home; that of another base shape is
/// where a shortest path from home brings the labels.
/// </summary>
/// <remarks>
/// A state's number is (place of its shape in the region) · (order of the vertex group) + (digits of a member of the vertex group along its stabilizer chain): with <c>b</c> the labels of the base state and
/// <c>τ(s)</c> the permutation of a tree path from the base shape, the states of shape <c>s</c> are <c>b * g * τ(s)</c> for the members <c>g</c>. Doing a step is two or three table look-ups and touches no
/// permutation. Immutable, safe to share.
/// </remarks>
public sealed class StateNumbering
{
    private readonly RegionShapes _region;
    private readonly Lazy<RowTable> _steps;
    private readonly long _order;
    private readonly Permutation _base;
    private readonly Permutation _back;

    private StateNumbering(VertexGroup group)
    {
        Group = group;
        _region = new RegionShapes(group.Groupoid, group.BaseShape);
        _order = (long)group.Order;
        Digits = StateDigits.Create(_region, group.Group.Chain);
        _base = group.Groupoid.PathTo(group.BaseShape).Permutation;
        _back = _base.Inverse();
        _steps = new Lazy<RowTable>(() => Tabulate(MoveSet.Of(_region, Metric.Step, default), group.Groupoid.DegreeOfParallelism, default));
    }

    /// <summary>The vertex group whose members make the states of the base shape.</summary>
    public VertexGroup Group { get; }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism => Group.Groupoid.Mechanism;

    /// <summary>The number of states.</summary>
    public long Count => _region.Count * _order;

    /// <summary>The number of shapes of the region.</summary>
    public int ShapeCount => _region.Count;

    internal RegionShapes Region => _region;

    internal StateDigits Digits { get; }

    /// <summary>Numbers the states of the home region.</summary>
    /// <param name="mechanism">The mechanism; it is explored and its vertex group at home computed.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="InvalidOperationException">There are more states than a 63-bit number can count.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static StateNumbering Of(Mechanism mechanism, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        return Of(ShapeGroupoid.Explore(mechanism, cancellationToken: cancellationToken).VertexGroupAt(0, cancellationToken));
    }

    /// <summary>Numbers the states of a vertex group's region.</summary>
    /// <param name="group">The vertex group at the base shape.</param>
    /// <exception cref="InvalidOperationException">There are more states than a 63-bit number can count.</exception>
    public static StateNumbering Of(VertexGroup group)
    {
        ArgumentNullException.ThrowIfNull(group);
        return group.StateCount <= long.MaxValue
            ? new StateNumbering(group)
            : throw new InvalidOperationException($"The region has {group.StateCount} states; only up to {long.MaxValue} can be numbered.");
    }

    /// <summary>The number of a state; -1 where it is not among those numbered.</summary>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    public long Rank(State state)
    {
        ArgumentNullException.ThrowIfNull(state);
        if (!ReferenceEquals(state.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The state belongs to the mechanism {state.Mechanism.Name}, the numbering to {Mechanism.Name}.", nameof(state));
        }

        var place = state.Shape is null ? -1 : _region.PlaceOf(Group.Groupoid.IndexOf(state.Shape));
        var number = place < 0 ? -1 : Digits.Rank(place, _back * state.Labels);
        return number < 0 ? -1 : (place * _order) + number;
    }

    /// <summary>The state of a number.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such number.</exception>
    public State Unrank(long number)
    {
        RequireNumber(number);
        var (place, within) = Math.DivRem(number, _order);
        return Mechanism.StateOf(_base * Digits.Unrank((int)place, within));
    }

    /// <summary>The number of the shape, in the groupoid, of the state of a number.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such number.</exception>
    public int ShapeOf(long number)
    {
        RequireNumber(number);
        return _region.ShapeAt((int)(number / _order));
    }

    /// <summary>The number of the state after a step; -1 where the step is barred or leaves the region. The tables behind it are made at the first call.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such number.</exception>
    public long After(long number, Step step)
    {
        ArgumentNullException.ThrowIfNull(step);
        RequireNumber(number);
        Mechanism.Board.Of(step);
        return _steps.Value.After(number, step.Index);
    }

    /// <summary>The table of steps, a slot each; made at the first call.</summary>
    internal RowTable StepTable => _steps.Value;

    /// <summary>The labels of the base state.</summary>
    internal Permutation BaseLabels => _base;

    /// <summary>The permutation τ of the tree path from the base shape to the shape at a place.</summary>
    internal Permutation PathTo(int place) => Digits.Path(place);

    /// <summary>The number of the state with the labels <c>b * reached</c>, where the permutation reached is that of a path from the base shape to the shape at a place; -1 where there is no such path.</summary>
    internal long Number(int place, Permutation reached) => Digits.Rank(place, reached) is >= 0 and var number ? (place * _order) + number : -1;

    internal RowTable Tabulate(MoveSet moves, int threads, CancellationToken cancellation) =>
        Digits.Tabulate(moves, RowSplit.For(Digits.OrbitLengths, ShapeCount, moves.Width), threads, cancellation);

    private void RequireNumber(long number)
    {
        if ((ulong)number >= (ulong)Count)
        {
            throw new ArgumentOutOfRangeException(nameof(number), number, $"There are {Count} states, numbered from 0.");
        }
    }
}
