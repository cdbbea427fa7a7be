using System.Collections.Immutable;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>What a solver knows of one region: its vertex group at a base shape, and the words for it once they are wanted.</summary>
internal sealed class RegionContext
{
    /// <summary>How many products of loops are tried to shorten words.</summary>
    private const int ShorteningRounds = 20_000;

    /// <summary>How many short loops are looked for, and how many states are held meanwhile.</summary>
    private const int MaxShortLoops = 4_000;
    private const int MaxLoopStates = 100_000;

    private readonly ulong _seed;
    private Func<Permutation, List<Step>?>? _undo;
    private StagedWords? _staged;

    public RegionContext(VertexGroup group, ulong seed)
    {
        Group = group;
        _seed = seed;
    }

    public VertexGroup Group { get; }

    public ShapeGroupoid Groupoid => Group.Groupoid;

    /// <summary>The steps of a loop at the base shape that undoes a member of the vertex group; null where the words needed would be too long.</summary>
    public List<Step>? Undo(Permutation member, CancellationToken cancellation)
    {
        if (_undo is null)
        {
            _undo = Group.Groupoid.Mechanism.SiteCount <= 256 ? Fill(new MinkwitzTable<byte>(Group, _seed)) : Fill(new MinkwitzTable<ushort>(Group, _seed));
        }

        return _undo(member);

        Func<Permutation, List<Step>?> Fill<T>(MinkwitzTable<T> table)
            where T : unmanaged, System.Numerics.IBinaryInteger<T>
        {
            table.Fill(Loops(cancellation), ShorteningRounds, cancellation);
            return table.Undo;
        }
    }

    /// <summary>Short words by stages; chosen and filled at the first call.</summary>
    public StagedWords Staged(StagedOptions options, CancellationToken cancellation) => _staged ??= new StagedWords(Group, options, cancellation);

    // Short loops from a search over states, and those that generate the group for certain.
    private List<TurnPath> Loops(CancellationToken cancellation)
    {
        var home = Groupoid.ShapeAt(Group.BaseShape);
        var loops = new LoopSearch(home, cancellation).ShortLoops(MaxLoopStates, MaxShortLoops);
        loops.AddRange(Group.GeneratorLoops());
        loops.Sort((one, other) => one.Length.CompareTo(other.Length));
        return loops;
    }
}
