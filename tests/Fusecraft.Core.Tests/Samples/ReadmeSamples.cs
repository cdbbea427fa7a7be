using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the README; the regions are the text shown there.</summary>
public class ReadmeSamples
{
    [Fact]
    public void Explore()
    {
        var path = Repository.PathOf("docs/workshop/weir-gate.fuse.json");

        #region Readme.Explore
        var mechanism = MechanismFile.Load(path);
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var loops = groupoid.VertexGroupAt(0);

        var shapes = groupoid.ShapeCount;       // 2244
        var states = loops.StateCount;          // 1407115100160, exactly
        var factors = loops.Group.FactoredOrder; // 2^13·3^7·5·7, proven

        var scramble = mechanism.ParseState("U L R F D");
        var result = new Solver(mechanism).Solve(scramble);
        var home = scramble.Apply(result.Path!.Word);
        #endregion

        Assert.Equal(2244, shapes);
        Assert.Equal(1407115100160, states);
        Assert.Equal("2^13·3^7·5·7", factors.ToString());
        Assert.Equal(mechanism.HomeState, home);
    }

    [Fact]
    public void Build()
    {
        #region Readme.Build
        var twinLock = MechanismBuilder.Custom("Twin lock", 6)
            .Turn("North", "(1 2 3)", turn => turn.BarredBy("pin@1"))
            .Turn("South", "(4 5 6)")
            .Turn("Sluice", "(3 4)", turn => turn.Needs("pin@2"))
            .Mark("pin", "1")
            .Block("5", "6")
            .Build();

        var barrier = twinLock.Home.WhyBarred(twinLock.FindTurn("North")!.Forward);
        // pin@1 is in the way
        #endregion

        Assert.Equal("pin@1 is in the way", barrier!.ToString());
    }

    [Fact]
    public void Play()
    {
        var mechanism = MechanismFile.Load(Repository.PathOf("docs/workshop/lock-basin.fuse.json"));

        #region Readme.Play
        var play = new Playthrough(mechanism);
        Span<int> free = stackalloc int[mechanism.Steps.Length];
        var count = play.FreeSteps(free);

        var done = play.TryStep(mechanism.FindTurn("North")!.Forward);
        var barred = !play.TryStep(mechanism.FindTurn("Sluice")!.Forward);
        play.Undo();
        #endregion

        Assert.Equal(3, count);
        Assert.True(done);
        Assert.True(barred);
        Assert.True(play.IsHome);
    }

    [Fact]
    public void Group()
    {
        #region Readme.Group
        var group = PermutationGroup.Generate(
            Permutation.Parse("(1 2 3 4 5 6 7 8 9 10 11)"),
            Permutation.Parse("(3 7 11 8)(4 10 5 6)"));

        var order = group.FactoredOrder;                        // 2^4·3^2·5·11
        var isMember = group.Contains(Permutation.Parse("(1 2)")); // false
        var random = group.RandomElement(new SeededRandom(2026)); // each of the 7920 equally likely
        #endregion

        Assert.Equal(FactoredInteger.Parse("2^4·3^2·5·11"), order);
        Assert.False(isMember);
        Assert.True(group.Contains(random));
    }
}
