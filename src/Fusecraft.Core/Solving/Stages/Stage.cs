using System.Numerics;
using Fusecraft.Groups;

namespace Fusecraft.Solving;

/// <summary>
/// One stage of a descent: moves, and the colours of the labels that it brings home, at the base shape. What is left to do is bounded below by tables over products of coset spaces; where one table holds all of
/// them, it is the exact cost.
/// </summary>
internal sealed class Stage
{
    /// <summary>The table of what each loop does to a coset space has at most this many entries.</summary>
    private const int MaxEntries = 1 << 25;

    private readonly StageComponent[] _components;
    private readonly StageTable[] _tables;
    private readonly bool[] _follows;

    private Stage(StageFrame frame, StageComponent[] components, StageTable[] tables)
    {
        Frame = frame;
        _components = components;
        _tables = tables;
        _follows = Follows(frame);
    }

    public StageFrame Frame { get; }

    public ReadOnlySpan<StageComponent> Components => _components;

    public ReadOnlySpan<StageTable> Tables => _tables;

    /// <summary>True when a move may come right after another; it may not where another order or another move does the same.</summary>
    public bool MayFollow(int move, int next) => _follows[((move + 1) * Frame.Moves.Length) + next];

    /// <summary>Builds a stage; null where it does not fit.</summary>
    /// <param name="frame">Its shapes and moves.</param>
    /// <param name="group">The loops at the base shape that its moves make.</param>
    /// <param name="goal">For each label the colour that is to be home.</param>
    /// <param name="maxComponent">The greatest number of entries of a coset space.</param>
    /// <param name="maxTable">The greatest number of entries of a table.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static Stage? Build(StageFrame frame, PermutationGroup group, int[] goal, int maxComponent, int maxTable, CancellationToken cancellation)
    {
        maxComponent = Math.Min(maxComponent, Math.Min(maxTable / frame.ShapeCount, MaxEntries / frame.Loops.Count));
        if (StageColourings.Split(group, goal, new BigInteger(maxComponent), cancellation) is not { } colourings)
        {
            return null;
        }

        if (colourings.Count == 0)
        {
            colourings.Add(new int[goal.Length]);
        }

        var components = new List<StageComponent>();
        foreach (var colours in colourings)
        {
            if (StageComponent.Build(frame, colours, maxComponent, cancellation) is not { } component)
            {
                return null;
            }

            components.Add(component);
        }

        return new Stage(frame, [.. components], [.. Products(frame, components, maxTable).Select(product => StageTable.Build(frame, components, product, cancellation))]);
    }

    /// <summary>Writes the coordinates of a state.</summary>
    /// <param name="shape">The frame's number of its shape.</param>
    /// <param name="siteOf">For each label the site it is on.</param>
    /// <param name="coordinates">As many as there are components.</param>
    /// <returns>False where the moves cannot bring it home.</returns>
    public bool TryRank(int shape, ReadOnlySpan<ushort> siteOf, Span<int> coordinates)
    {
        // Taken back along the tree, the labels are moved by a loop.
        var labelOn = new int[siteOf.Length];
        for (var label = 0; label < siteOf.Length; label++)
        {
            labelOn[Frame.Back[shape][siteOf[label]]] = label;
        }

        for (var i = 0; i < _components.Length; i++)
        {
            coordinates[i] = _components[i].Rank(labelOn);
            if (coordinates[i] < 0)
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>No word of the stage's moves that brings these coordinates home costs less; 0 only at home.</summary>
    public int LeastCost(int shape, ReadOnlySpan<int> coordinates)
    {
        var least = 0;
        foreach (var table in _tables)
        {
            least = Math.Max(least, table.Cost(shape, coordinates));
        }

        return least;
    }

    // For each component the largest product that fits and holds it.
    private static List<int[]> Products(StageFrame frame, List<StageComponent> components, int maxTable)
    {
        int[] bySize = [.. Enumerable.Range(0, components.Count).OrderByDescending(component => components[component].Count)];
        var products = new List<int[]>();
        foreach (var first in bySize)
        {
            var product = new List<int> { first };
            var size = (long)frame.ShapeCount * components[first].Count;
            foreach (var other in bySize)
            {
                if (other != first && size * components[other].Count <= maxTable)
                {
                    product.Add(other);
                    size *= components[other].Count;
                }
            }

            product.Sort();
            if (!products.Exists(known => product.TrueForAll(known.Contains)))
            {
                products.Add([.. product]);
            }
        }

        return products;
    }

    // Moves of one class do not follow each other, a loop is not undone at once, and of two moves that commute wherever they are free the first in the list comes first.
    private static bool[] Follows(StageFrame frame)
    {
        var moves = frame.Moves;
        var follows = new bool[(moves.Length + 1) * moves.Length];
        Array.Fill(follows, true);
        for (var one = 0; one < moves.Length; one++)
        {
            for (var next = 0; next < moves.Length; next++)
            {
                follows[((one + 1) * moves.Length) + next] = !(moves[one].Class >= 0 && moves[one].Class == moves[next].Class)
                    && !(moves[one].Permutation * moves[next].Permutation).IsIdentity
                    && !(next < one && moves[one].Class != moves[next].Class && Commute(frame, one, next));
            }
        }

        return follows;
    }

    private static bool Commute(StageFrame frame, int one, int other)
    {
        if (frame.Moves[one].Permutation * frame.Moves[other].Permutation != frame.Moves[other].Permutation * frame.Moves[one].Permutation)
        {
            return false;
        }

        for (var shape = 0; shape < frame.ShapeCount; shape++)
        {
            if (After(After(shape, one), other) is var there && there != After(After(shape, other), one))
            {
                return false;
            }
        }

        return true;

        int After(int shape, int move) => shape < 0 ? -1 : frame.Targets[(shape * frame.Moves.Length) + move];
    }
}
