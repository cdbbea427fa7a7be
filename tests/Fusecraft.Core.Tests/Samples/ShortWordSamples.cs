using Fusecraft.Mechanisms;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on short words; the regions are the text shown there.</summary>
public class ShortWordSamples
{
    [Fact]
    public void Solve()
    {
        #region ShortWords.Solve
        var cube = MechanismBuilder.Cube("Corner stone", 3).Block("UFR", "UF").Build();
        var state = cube.ParseState("L D B' D2 L2 B D' L B2 D L' B D2 L' B' D");

        var solver = new StagedSolver(cube, new StagedOptions { Metric = Metric.Run, MaxNodes = 200_000 });
        var result = solver.Solve(state);

        var home = state.Apply(result.Path!.Word) == cube.HomeState;    // true: every word is replayed
        var length = result.Length;                                     // in runs, the metric asked for
        #endregion

        Assert.True(home);
        Assert.InRange(length, 1, 30);
    }

    [Fact]
    public void Time()
    {
        var cube = Make.Cube(2);
        var state = cube.ParseState("U R F2 U' R2 F U2 R'");

        #region ShortWords.Time
        var timed = new StagedSolver(cube, new StagedOptions { TimeLimit = TimeSpan.FromSeconds(0.1) }).Solve(state);
        var again = new StagedSolver(cube, new StagedOptions { MaxNodes = timed.Nodes }).Solve(state);

        var same = timed.Path!.Word == again.Path!.Word;    // true, on any machine
        #endregion

        Assert.True(same);
    }
}
