using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// The game on the projective plane of order 3: points 0 … 12, lines {i, i+1, i+3, i+9} mod 13. With the gap at p, the counter of q goes to p and the counters on the other two points of the
/// line pq change places. Sources: J. H. Conway, M13, in <em>Surveys in Combinatorics</em> 1997, 1-11; J. H. Conway, N. D. Elkies, J. L. Martin, The Mathieu group M12 and its pseudogroup
/// extension M13, Experiment. Math. 15 (2006) 223-236 (abstract opened).
/// </summary>
public class ThirteenPointGameTests
{
    [Fact]
    public void Closed_sequences_make_the_Mathieu_group_M12_wherever_the_gap_is()
    {
        var groupoid = ShapeGroupoid.Explore(ThirteenPointGame.Create());
        Assert.Equal(13, groupoid.ShapeCount);
        var home = groupoid.VertexGroupAt(0);
        for (var shape = 0; shape < 13; shape++)
        {
            var group = groupoid.VertexGroupAt(shape);
            Assert.Equal(95040, group.Order);
            Assert.Equal(ChainProof.Proven, group.Group.Chain.Proof);

            // Sharply 5-transitive on the twelve counters.
            Assert.Equal([12, 11, 10, 9, 8], group.Group.Chain.OrbitLengths.ToArray());
            Assert.Equal(12, Assert.Single(group.Group.MovedOrbits).Length);
            Conjugacy.Holds(home, group);
            Assert.True(home.MovedTo(shape).Group.SameGroupAs(group.Group));
        }
    }

    // The same 2006 paper: M13 has 13 x 95040 elements.
    [Fact]
    public void There_are_13_times_as_many_positions() => Assert.Equal(1235520, ShapeGroupoid.Explore(ThirteenPointGame.Create()).VertexGroupAt(0).StateCount);

    // Own figure: without the gap's rule the moves, each a product of two transpositions, generate the alternating group.
    [Fact]
    public void Without_the_gap_the_moves_make_the_alternating_group() => Assert.Equal(3113510400, ThirteenPointGame.Create().UnguardedGroup.Order);
}
