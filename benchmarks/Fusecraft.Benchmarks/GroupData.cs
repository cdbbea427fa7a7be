using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>The generators that the tests keep as files: one permutation a line, in cycles of 1-based points.</summary>
internal static class GroupData
{
    public static Permutation[] Read(string file) =>
        [.. File.ReadLines(Path.Combine(AppContext.BaseDirectory, "Data", file)).Where(line => line.StartsWith('(')).Select(line => Permutation.Parse(line, null))];
}
