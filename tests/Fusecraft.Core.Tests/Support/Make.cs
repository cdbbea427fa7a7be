using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Support;

/// <summary>Short ways to write mechanisms in tests.</summary>
internal static class Make
{
    /// <summary>A cube with the turns of <paramref name="use"/> (separated by spaces; all where empty) and blocks, each as piece names separated by spaces.</summary>
    public static Mechanism Cube(int size, string use = "", params ReadOnlySpan<string> blocks) => Mechanism.Create(new MechanismDefinition
    {
        Name = "cube",
        Family = new CubeFamily(size),
        Use = Split(use),
        Blocks = SplitAll(blocks),
    });

    public static Mechanism Board(int columns, int rows, params ReadOnlySpan<string> gaps) =>
        Mechanism.Create(new MechanismDefinition { Name = "board", Family = new BoardFamily(columns, rows, [.. gaps]) });

    /// <summary>A graph board with vertices 1 … n and one gap.</summary>
    public static Mechanism GraphBoard(int vertices, IEnumerable<(int A, int B)> edges, int gap) => Mechanism.Create(new MechanismDefinition
    {
        Name = "graph",
        Family = new GraphBoardFamily(Numbers(vertices), [.. edges.Select(edge => ($"{edge.A}", $"{edge.B}"))], $"{gap}"),
    });

    /// <summary>Turns given as <c>name: cycles</c>, always free but for the blocks and marks.</summary>
    public static Mechanism Custom(int sites, IEnumerable<TurnDefinition> turns, ReadOnlySpan<string> blocks = default, params ReadOnlySpan<MarkDefinition> marks) =>
        Mechanism.Create(new MechanismDefinition { Name = "custom", Sites = Numbers(sites), Turns = [.. turns], Blocks = SplitAll(blocks), Marks = [.. marks] });

    public static TurnDefinition Turn(string name, string moves) => new() { Name = name, Moves = moves };

    public static GuardDefinition Needs(params ImmutableArray<string> marks) => new() { Needs = marks };

    public static GuardDefinition BarredBy(params ImmutableArray<string> marks) => new() { BarredBy = marks };

    public static MarkDefinition Mark(string name, params ImmutableArray<string> sites) => new(name, sites);

    public static ImmutableArray<string> Numbers(int count) => [.. Enumerable.Range(1, count).Select(i => $"{i}")];

    public static ImmutableArray<string> Split(string names) => [.. names.Split(' ', StringSplitOptions.RemoveEmptyEntries)];

    public static BigInteger Factorial(int n) => Enumerable.Range(1, n).Aggregate(BigInteger.One, (product, i) => product * i);

    private static ImmutableArray<ImmutableArray<string>> SplitAll(ReadOnlySpan<string> lists)
    {
        var all = ImmutableArray.CreateBuilder<ImmutableArray<string>>(lists.Length);
        foreach (var list in lists)
        {
            all.Add(Split(list));
        }

        return all.DrainToImmutable();
    }
}
