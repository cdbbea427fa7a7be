using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on random turns; the regions are the text shown there.</summary>
public class MixingSamples
{
    [Fact]
    public void Distances()
    {
        #region Mixing.Distances
        var cube = Mechanism.Create(new MechanismDefinition { Name = "Small cube", Family = new CubeFamily(2) });
        var walk = RandomWalk.Of(cube);                 // 3,674,160 states, quarter turns
        var distances = walk.Distances(until: 0.01);

        var period = walk.Period;                       // 2: a quarter turn is an odd permutation of the pieces
        var mixed = distances.TurnsTo(0.25);            // 22, and one more by toss
        var fine = distances.TurnsTo(0.01);             // 44, and one more by toss
        var never = distances.TurnsToUniform(0.25);     // null: without the toss the distance stays above a half
        var left = distances.ByTurns[23].FromLimit;     // so 23 turns are not enough for a contest
        #endregion

        // Own computation, regression figures.
        Assert.Equal((2, 22, 44, null), (period, mixed, fine, never));
        Assert.InRange(left, 0.2, 0.25);
    }

    [Fact]
    public void Weights()
    {
        #region Mixing.Weights
        var swaps = Mechanism.FromGenerators("Neighbours", 4, ("a", Permutation.Parse("(1 2)")), ("b", Permutation.Parse("(2 3)")), ("c", Permutation.Parse("(3 4)")));
        var walk = RandomWalk.Of(swaps, new WalkOptions
        {
            Weights = new Dictionary<string, double> { ["b"] = 2, ["b'"] = 2 },
            Holding = 0.1,
        });
        var turns = walk.Distances(until: 0.01).TurnsToUniform(0.01);
        #endregion

        Assert.Equal(1, walk.Period);
        Assert.InRange(turns!.Value, 10, 40);
    }

    [Fact]
    public void Watching()
    {
        #region Mixing.Watching
        var cube = Mechanism.Create(new MechanismDefinition { Name = "Bare cube", Family = new CubeFamily(3) });
        var sites = new[] { "UF:U", "UR:U", "UB:U" }.Select(name => cube.FindSite(name)!.Value);
        var walk = RandomWalk.Watching(cube, sites);               // 24 · 22 · 20 = 10,560 positions of three edges
        var bound = walk.Distances(23).ByTurns[^1].FromUniform;    // 0.0341: at least this far from fair after 23 turns
        #endregion

        Assert.Equal(10560, walk.StateCount);
        Assert.Equal(0.0341, bound, 4);
    }

    [Fact]
    public void Gap()
    {
        #region Mixing.Gap
        var swaps = Mechanism.FromGenerators("Neighbours", Permutation.Parse("(1 2)"), Permutation.Parse("(2 3)"), Permutation.Parse("(3 4)"), Permutation.Parse("(4 5)"));
        var spectrum = RandomWalk.Of(swaps).Spectrum();
        var gap = spectrum.Gap;                             // 0.0954915 = 2(1 - cos(π/5))/4
        var times = spectrum.Eigenvalues[1].Multiplicity;   // 4
        var atMost = spectrum.TurnsSufficient(0.01);
        var atLeast = spectrum.TurnsNecessary(0.01);
        #endregion

        Assert.Equal(2 * (1 - Math.Cos(Math.PI / 5)) / 4, gap, 10);
        Assert.Equal(4, times);
        Assert.InRange(RandomWalk.Of(swaps).Distances(until: 0.01).TurnsTo(0.01)!.Value, atLeast!.Value, atMost!.Value);
    }
}
