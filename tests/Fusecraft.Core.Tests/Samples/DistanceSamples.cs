using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on distances and scrambles; the regions are the text shown there.</summary>
public class DistanceSamples
{
    [Fact]
    public void Numbering()
    {
        var path = Repository.PathOf("docs/workshop/lock-basin.fuse.json");

        #region Distances.Numbering
        var mechanism = MechanismFile.Load(path);
        var numbering = StateNumbering.Of(mechanism);

        var states = numbering.Count;                                        // 960
        var north = mechanism.FindTurn("North")!.Forward;
        var number = numbering.After(0, north);                              // home is number 0
        var same = numbering.Unrank(number) == mechanism.ParseState("North"); // true
        #endregion

        Assert.Equal(960, states);
        Assert.True(same);
    }

    [Fact]
    public void Table()
    {
        #region Distances.Table
        var board = MechanismBuilder.Board("Ferry", 3, 3).Build();
        var table = DistanceTable.Build(StateNumbering.Of(board));

        var greatest = table.Greatest;                       // 31 slides, and no state needs more
        var farthest = table.StatesAt(31).ToList();          // 2 states
        var atTen = table.Counts[10];                        // 286 states are exactly 10 slides from home

        var state = board.ParseState("R D L U");
        var way = table.ShortestPath(state)!.Word;           // a shortest way home
        var hints = table.BestSteps(state);                  // all steps that begin one
        var ways = table.CountShortestPaths(state);          // how many there are
        #endregion

        Assert.Equal(31, greatest);
        Assert.Equal(2, farthest.Count);
        Assert.Equal(286, atTen);
        Assert.Equal(board.HomeState, state.Apply(way));
        Assert.Equal(4, way.Length);
        Assert.NotEmpty(hints);
        Assert.True(ways >= 1);
    }

    [Fact]
    public void Scramble()
    {
        #region Distances.Scramble
        var cube = MechanismBuilder.Cube("Corner stones", 2).Build();
        var fair = Scrambler.Of(cube);
        var hard = Scrambler.Of(cube, new ScrambleOptions { LeastDistance = 10, Metric = Metric.Run });

        var random = new SeededRandom(2026);
        var any = fair.Next(random);               // one of all 3,674,160 states, each equally likely
        var far = hard.Next(random);               // one of the 626,444 that need ten turns or more
        var made = cube.HomeState.Apply(far.Path!.Word);
        #endregion

        Assert.Equal(3674160, fair.StateCount);
        Assert.Equal(626444, hard.StateCount);
        Assert.Equal(any.State, cube.HomeState.Apply(any.Path!.Word));
        Assert.Equal(far.State, made);
    }
}
