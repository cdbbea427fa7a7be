using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>Cubes with random blocks of adjacent pieces. A seed gives one of them.</summary>
internal static class RandomFusings
{
    public static Mechanism From(ulong seed, int size, int mostBlocks = 3) => Mechanism.Create(DefinitionFrom(seed, size, mostBlocks));

    public static MechanismDefinition DefinitionFrom(ulong seed, int size, int mostBlocks = 3)
    {
        var random = new SeededRandom(seed);
        var plain = Make.Cube(size);
        var left = Enumerable.Range(0, plain.PieceCount).ToHashSet();
        var definition = new MechanismDefinition { Name = $"fusing {seed}", Family = new CubeFamily(size) };
        for (var count = 1 + random.NextInt32(mostBlocks); count > 0; count--)
        {
            var block = new List<int> { left.ElementAt(random.NextInt32(left.Count)) };
            left.Remove(block[0]);
            for (var more = 1 + random.NextInt32(2); more > 0; more--)
            {
                var next = plain.Adjacency!.Select(pair => block.Contains(pair.A) ? pair.B : block.Contains(pair.B) ? pair.A : -1).Where(left.Contains).Order().ToList();
                if (next.Count > 0)
                {
                    block.Add(next[random.NextInt32(next.Count)]);
                    left.Remove(block[^1]);
                }
            }

            if (block.Count > 1)
            {
                definition = definition.WithBlock(block.Select(piece => plain.PieceNames[piece]));
            }
        }

        return definition;
    }
}
