using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

// Shortest words, by descent through the table.
public sealed partial class DistanceTable
{
    /// <summary>A shortest path: from the state to the nearest goal, or from the base state to the state, as <see cref="Origin"/> says. Null where the state has no distance.</summary>
    /// <param name="state">A state of the mechanism.</param>
    /// <remarks>The first of the shortest by the order of the steps, so always the same one. Takes one look-up for each move and step of the way.</remarks>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    public TurnPath? ShortestPath(State state)
    {
        ArgumentNullException.ThrowIfNull(state);
        return Numbering.Rank(state) is >= 0 and var number ? PathOf(number, state.Shape!) : null;
    }

    /// <summary>A shortest path from a state whose labels are those of the base state followed by a permutation; null where it has no distance. For tables that lead to the base.</summary>
    internal TurnPath? PathToBase(State from, Permutation reached) =>
        Numbering.Number(Numbering.Region.PlaceOf(Numbering.Group.Groupoid.IndexOf(from.Shape!)), reached) is >= 0 and var number ? PathOf(number, from.Shape!) : null;

    private TurnPath? PathOf(long number, Shape shape)
    {
        if (DistanceOf(number) is not (>= 0 and var distance))
        {
            return null;
        }

        var moves = new List<Move>();
        while (distance > 0 || _hasFreeMoves)
        {
            if (_hasFreeMoves && !TryGoFreely(ref number, distance, moves))
            {
                break;
            }

            var (slot, next) = NearerMoves(number, distance).First(move => MoveAt(number, move.Slot).Cost > 0);
            moves.Add(MoveAt(number, slot));
            distance -= moves[^1].Cost;
            number = next;
        }

        if (Origin == DistanceOrigin.ToGoal)
        {
            return TurnPath.Follow(shape, moves.SelectMany(move => move.Steps));
        }

        // Where moves are their own reverses, those that lead back are found, and undone here.
        moves.Reverse();
        var steps = moves.SelectMany(move => _moves.IsBackward ? move.Steps : move.Steps.Reverse().Select(step => step.Opposite!));
        return TurnPath.Follow(Numbering.Unrank(0).Shape!, steps);
    }

    /// <summary>
    /// The steps that begin a shortest path from a state to the goal: hints for a player. Empty at the goal and where there is no path. Where runs are counted, the first steps of all shortest runs.
    /// </summary>
    /// <param name="state">A state of the mechanism.</param>
    /// <exception cref="InvalidOperationException">The table measures from the base state, and a step need not have a reverse of equal cost.</exception>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    public ImmutableArray<Step> BestSteps(State state)
    {
        if (_moves.IsBackward)
        {
            throw new InvalidOperationException("The table measures from the base state; steps towards a goal need one that measures to the goal.");
        }

        var number = Numbering.Rank(state);
        var distance = number < 0 ? -1 : DistanceOf(number);
        if (distance < 0)
        {
            return [];
        }

        var best = new SortedDictionary<int, Step>();
        foreach (var (slot, _) in NearerMoves(number, distance))
        {
            var first = MoveAt(number, slot).Steps[0];
            best[first.Index] = first;
        }

        return [.. best.Values];
    }

    /// <summary>In how many ways a shortest path can be gone, counted by moves of the metric: a run counts as one however it is written. 0 where the state has no distance.</summary>
    /// <param name="state">A state of the mechanism.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes memory for the states on shortest paths.</remarks>
    /// <exception cref="InvalidOperationException">A move costs 0, so shortest paths can go on for ever.</exception>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public BigInteger CountShortestPaths(State state, CancellationToken cancellationToken = default)
    {
        var number = Numbering.Rank(state);
        var distance = number < 0 ? -1 : DistanceOf(number);
        if (distance < 0)
        {
            return BigInteger.Zero;
        }

        if (_hasFreeMoves)
        {
            throw new InvalidOperationException("Moves of cost 0 can be done over and over, so shortest paths cannot be counted in this metric.");
        }

        var levels = new SortedDictionary<int, Dictionary<long, BigInteger>>(Comparer<int>.Create(static (a, b) => b.CompareTo(a)))
        {
            [distance] = new() { [number] = BigInteger.One },
        };
        while (levels.First() is { Key: > 0 } level)
        {
            levels.Remove(level.Key);
            foreach (var (from, ways) in level.Value)
            {
                cancellationToken.ThrowIfCancellationRequested();
                foreach (var (slot, to) in NearerMoves(from, level.Key))
                {
                    var left = level.Key - MoveAt(from, slot).Cost;
                    if (!levels.TryGetValue(left, out var states))
                    {
                        levels.Add(left, states = []);
                    }

                    states[to] = states.GetValueOrDefault(to) + ways;
                }
            }
        }

        return levels.First().Value.Values.Aggregate(BigInteger.Zero, (sum, ways) => sum + ways);
    }

    /// <summary>The states at a distance, in the order of their numbers.</summary>
    /// <param name="distance">At <see cref="Greatest"/> these are the antipodes.</param>
    /// <remarks>Goes through the whole table. With two bits a state, those of a fitting residue are looked into one by one; the farthest are told from the others by their neighbours.</remarks>
    public IEnumerable<State> StatesAt(int distance)
    {
        foreach (var number in NumbersAt(distance))
        {
            yield return Numbering.Unrank(number);
        }
    }

    internal IEnumerable<long> NumbersAt(int distance)
    {
        if (distance < 0 || distance > Greatest)
        {
            yield break;
        }

        var code = ResidueTable.CodeOf(distance);
        for (var number = 0L; number < Numbering.Count; number++)
        {
            if (_wide is not null ? _wide.Distance(number) == distance : Code(number) == code && !(distance == Greatest && HasFarther(number, code)) && DistanceOf(number) == distance)
            {
                yield return number;
            }
        }
    }

    private bool HasFarther(long number, int code)
    {
        for (var slot = 0; slot < _rows.Slots; slot++)
        {
            var next = _rows.After(number, slot);
            if (next >= 0 && ResidueTable.Before(Code(next)) == code)
            {
                return true;
            }
        }

        return false;
    }

    // The first move to a state of the residue before; slot -1 where there is none, as at distance 0.
    private (int Slot, long State) Nearer(long number)
    {
        var wanted = ResidueTable.Before(Code(number));
        for (var slot = 0; slot < _rows.Slots; slot++)
        {
            var next = _rows.After(number, slot);
            if (next >= 0 && Code(next) == wanted)
            {
                return (slot, next);
            }
        }

        return (-1, number);
    }

    // By moves of cost 0 to the nearest state that a costly move leads on from; false where one of distance 0 was arrived at.
    private bool TryGoFreely(ref long number, int distance, List<Move> moves)
    {
        var origins = new Dictionary<long, (long From, int Slot)> { [number] = (-1, -1) };
        var queue = new Queue<long>([number]);
        while (queue.TryDequeue(out var state))
        {
            if (distance == 0 ? IsStart(state) : NearerMoves(state, distance).Any(move => MoveAt(state, move.Slot).Cost > 0))
            {
                var count = moves.Count;
                number = state;
                for (var origin = origins[state]; origin.Slot >= 0; origin = origins[origin.From])
                {
                    moves.Insert(count, MoveAt(origin.From, origin.Slot));
                }

                return distance > 0;
            }

            foreach (var (slot, next) in NearerMoves(state, distance))
            {
                if (MoveAt(state, slot).Cost == 0 && origins.TryAdd(next, (state, slot)))
                {
                    queue.Enqueue(next);
                }
            }
        }

        throw new InvalidOperationException("The distances of the table do not fit together.");
    }

    private bool IsStart(long number) => _startsAtBase ? number == 0 : GoalStates.Contains(Numbering.Unrank(number));

    private IEnumerable<(int Slot, long State)> NearerMoves(long number, int distance)
    {
        var wanted = _wide is null ? ResidueTable.Before(Code(number)) : 0;
        for (var slot = 0; slot < _rows.Slots; slot++)
        {
            var next = _rows.After(number, slot);
            if (next >= 0 && (_wide is null ? Code(next) == wanted : _wide.Distance(next) == distance - MoveAt(number, slot).Cost))
            {
                yield return (slot, next);
            }
        }
    }

    private Move MoveAt(long number, int slot) => _moves.MoveAt((int)(number / _order), slot);
}
