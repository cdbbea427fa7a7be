using System.Collections.Immutable;
using System.Text;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>What a loop does to the blocks of its shape and to the pieces outside blocks: which go round, and which are turned.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class LoopEffect
{
    private readonly Mechanism _mechanism;

    internal LoopEffect(LoopBodies bodies, Permutation loop)
    {
        _mechanism = bodies.Mechanism;
        var cycles = new List<LoopCycle>();
        var isDone = new bool[bodies.Count];
        for (var start = 0; start < bodies.Count; start++)
        {
            if (isDone[start])
            {
                continue;
            }

            var cycle = ImmutableArray.CreateBuilder<ImmutableArray<int>>();
            var round = Permutation.Identity;
            for (var at = start; !isDone[at]; at = bodies.After(at, loop))
            {
                isDone[at] = true;
                cycle.Add(bodies.Pieces(at));
                round *= loop;
            }

            var twist = bodies.OrderOn(start, round);
            if (cycle.Count > 1 || twist > 1)
            {
                cycles.Add(new LoopCycle(cycle.DrainToImmutable(), twist));
            }
        }

        Cycles = [.. cycles.OrderByDescending(cycle => cycle.Bodies.Length).ThenByDescending(cycle => cycle.Twist)];
        MovedCount = Cycles.Sum(cycle => cycle.Bodies.Length);
        Signature = string.Join(' ', Cycles.Select(cycle => cycle.Twist == 1 ? $"{cycle.Bodies.Length}" : $"{cycle.Bodies.Length}x{cycle.Twist}"));
    }

    /// <summary>What goes round or is turned, longest first; those of one length by the order of their turning, greatest first.</summary>
    public ImmutableArray<LoopCycle> Cycles { get; }

    /// <summary>How many blocks and single pieces are not as before.</summary>
    public int MovedCount { get; }

    /// <summary>
    /// The cycle type with its twists: for each cycle its length, and after an <c>x</c> its <see cref="LoopCycle.Twist"/> where that is not 1. <c>3</c> is a three-cycle, <c>2 2</c> a double swap, <c>1x3 1x3</c> turns
    /// two pieces in their places, thrice until they are as before. Loops with conjugate permutations have equal signatures.
    /// </summary>
    public string Signature { get; }

    /// <summary>The kind; twists besides do not matter, except where nothing goes round.</summary>
    public LoopEffectKind Kind => Cycles.Where(cycle => cycle.Bodies.Length > 1).Select(cycle => cycle.Bodies.Length).ToList() switch
    {
        [] => Cycles.IsEmpty ? LoopEffectKind.None : LoopEffectKind.Twist,
        [2] => LoopEffectKind.Swap,
        [2, 2] => LoopEffectKind.DoubleSwap,
        [3] => LoopEffectKind.ThreeCycle,
        _ => LoopEffectKind.Other,
    };

    /// <summary>By names: <c>(UF UR UB)</c> for three that go round, <c>([UF UFR] [DL DBL])</c> for blocks that trade places, with <c>turned</c> behind it where they come back turned; <c>UFR turned</c> for one in its place.</summary>
    public override string ToString()
    {
        var text = new StringBuilder();
        foreach (var (bodies, twist) in Cycles)
        {
            text.Append(text.Length > 0 ? " " : "");
            var names = string.Join(' ', bodies.Select(body => body.Length == 1 ? _mechanism.PieceNames[body[0]] : $"[{string.Join(' ', body.Select(piece => _mechanism.PieceNames[piece]))}]"));
            text.Append(bodies.Length > 1 ? $"({names})" : names).Append(twist > 1 ? " turned" : "");
        }

        return text.Length == 0 ? "nothing" : text.ToString();
    }
}
