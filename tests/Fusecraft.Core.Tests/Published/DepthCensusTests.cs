using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Numbers of states at each distance, counted as far as is reasonable, against published lists.</summary>
public class DepthCensusTests
{
    // OEIS A080601, opened: the 3x3x3 by runs.
    [Fact]
    public void The_3x3x3_by_runs() =>
        Assert.Equal([1, 18, 243, 3240, 43239, 574908, 7618438], DepthCensus.Take(Make.Cube(3).HomeState, 6, Metric.Run).Counts.AsEnumerable());

    // OEIS A080602, opened: by quarter turns.
    [Fact]
    public void The_3x3x3_by_quarter_turns() =>
        Assert.Equal([1, 12, 114, 1068, 10011, 93840, 878880], DepthCensus.Take(Make.Cube(3).HomeState, 6).Counts.AsEnumerable());

    // OEIS A389728, opened: the 4x4 board, gap in a corner, a move slides any straight row of tiles.
    [Fact]
    public void The_4x4_board_by_runs() =>
        Assert.Equal([1, 6, 18, 54, 162, 486, 1457, 4334, 12568, 36046, 102801, 289534, 808623, 2231878, 6076994], DepthCensus.Take(Make.Board(4, 4).HomeState, 14, Metric.Run).Counts.AsEnumerable());

    // A posting on a public mathematics forum, 2005, opened: the layered disk, a move any turns of the layers and one of the slice. Each position stands for 12 x 12 alignments of the layers, which cost nothing.
    [Fact]
    public void The_layered_disk_with_layer_turns_without_weight()
    {
        var metric = Metric.Weights([new("T", 0), new("B", 0)]);
        var census = DepthCensus.Take(MechanismFile.Parse(LayeredDiskTests.Disk).HomeState, 5, metric);
        Assert.Equal([144, 144 * 64, 144 * 1153, 144 * 17050, 144 * 235144, 144 * 3091458], census.Counts.AsEnumerable());
        Assert.False(census.IsWhole);
    }

    // OEIS A092113, opened: prefix reversals of six things. A008302, opened: adjacent transpositions.
    [Fact]
    public void Plain_groups_are_counted_whole()
    {
        var prefixes = Mechanism.FromGenerators("prefixes", Enumerable.Range(2, 5).Select(n => Permutation.FromImages([.. Enumerable.Range(0, n).Reverse()])));
        var census = DepthCensus.Take(prefixes.HomeState, 100);
        Assert.Equal([1, 5, 20, 79, 199, 281, 133, 2], census.Counts.AsEnumerable());
        Assert.True(census.IsWhole);
        var adjacent = Mechanism.FromGenerators("adjacent", Enumerable.Range(0, 4).Select(i => Permutation.FromCycle(i, i + 1)));
        Assert.Equal([1, 4, 9, 15, 20, 22, 20, 15, 9, 4, 1], DepthCensus.Take(adjacent.HomeState, 10).Counts.AsEnumerable());
    }

    // Against trying everything; once with a list of moves for each shape, once with each state finding its own.
    [Fact]
    public void Random_mechanisms_are_counted_as_by_hand() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var random = new SeededRandom(seed);
        foreach (var metric in Solving.PruningTableTests.MetricsOf(mechanism, random))
        {
            var distances = NaiveDistances.From(mechanism.HomeState, metric);
            foreach (var fewShapes in (int[])[0, 1000])
            {
                var census = DepthCensus.Take(mechanism.HomeState, 4, metric, 1_000_000, fewShapes, default);
                Assert.Equal(distances.Values.Max() <= 4, census.IsWhole);
                Assert.Equal(census.IsWhole ? distances.Count : null, census.StateCount);
                Assert.False(census.IsCut);
                Assert.Equal(Math.Min(4, distances.Values.Max()) / census.Unit, census.Counts.Length - 1);
                for (var i = 0; i < census.Counts.Length; i++)
                {
                    Assert.Equal(distances.Values.Count(distance => distance == i * census.Unit), census.Counts[i]);
                }
            }
        }
    });

    [Fact]
    public void A_budget_leaves_out_what_it_could_not_finish()
    {
        var census = DepthCensus.Take(Make.Cube(3).HomeState, 6, Metric.Run, maxStates: 1000);
        Assert.Equal([1, 18, 243], census.Counts.AsEnumerable());
        Assert.True(census.IsCut);
    }
}
