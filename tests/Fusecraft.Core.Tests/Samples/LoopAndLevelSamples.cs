using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on loops and levels; the regions are the text shown there.</summary>
public class LoopAndLevelSamples
{
    [Fact]
    public void Catalogue()
    {
        var path = Repository.PathOf("docs/workshop/weir-gate.fuse.json");

        #region Loops.Catalogue
        var gate = MechanismFile.Load(path);
        var catalogue = LoopCatalogue.Of(gate.Home, new LoopCatalogueOptions { MaxLength = 8, MaxMoved = 3 });
        var loop = catalogue.Loops[0];

        var count = catalogue.Loops.Length;          // 8, all of length 8: none is shorter
        var word = loop.Path.ToString();             // L D L' U' L D' L' U
        var effect = loop.Effect.ToString();         // (DFL UFL UBL)
        var kind = loop.Effect.Kind;                 // ThreeCycle

        var group = ShapeGroupoid.Explore(gate).VertexGroupAt(0);
        var elsewhere = loop.ConjugateCount(group);  // 72 permutations that setups make of it
        #endregion

        Assert.Equal(8, count);
        Assert.All(catalogue.Loops, each => Assert.Equal(8, each.Length));
        Assert.Equal("L D L' U' L D' L' U", word);
        Assert.Equal("(DFL UFL UBL)", effect);
        Assert.Equal(LoopEffectKind.ThreeCycle, kind);
        Assert.Equal(72, elsewhere);
    }

    [Fact]
    public void Exchange()
    {
        #region Loops.Exchange
        var cube = MechanismBuilder.Cube("Cube", 3).Build();
        var solver = new Solver(cube);
        var swap = solver.Exchange(cube.HomeState, PieceExchange.Parse(cube, "(UF UR)", keepsOthers: false));
        var alone = solver.Exchange(cube.HomeState, PieceExchange.Parse(cube, "(UF UR)", keepsOthers: true));

        var steps = swap.Path!.Length;      // 3, proven shortest
        var possible = alone.IsSolvable;    // false: no member of the vertex group swaps two edges alone
        #endregion

        Assert.Equal(3, steps);
        Assert.False(possible);
    }

    [Fact]
    public void Measure()
    {
        var path = Repository.PathOf("docs/workshop/mill-race.fuse.json");

        #region Levels.Measure
        var race = MechanismFile.Load(path);
        var level = LevelMeasures.Of(race.ParseState("Wheel Gate"));

        var shortest = level.ShortestLength;                      // 6: the wheel has to go round
        var words = level.ShortestWordCount;                      // 1
        var first = level.Stages[0];
        var right = $"{first.BestCount} of {first.FreeCount}";    // 1 of 3
        var wrong = first.WrongMoves[0].Steps[0].Name;            // a wrong one:
        var costs = first.WrongMoves[0].Detour;                   // 6 steps more than without it
        #endregion

        Assert.Equal(6, shortest);
        Assert.Equal(1, words);
        Assert.Equal("1 of 3", right);
        Assert.Equal("Wheel", wrong);
        Assert.Equal(6, costs);
    }

    [Fact]
    public void Colours()
    {
        #region Levels.Colours
        var coloured = MechanismBuilder.Cube("Cube", 3).Colours(ColourScheme.Faces).Goal(Goal.Colours).Build();
        var solver = new Solver(coloured);
        var flipped = solver.Complete(coloured.ParseColours("UF:U=F UF:F=U"));
        var two = solver.Complete(coloured.ParseColours("UF:U=F UF:F=U UB:U=B UB:B=U"));

        var single = flipped.IsPossible;     // false: proven, no scramble shows it
        var state = two.State!.ToString();   // (UB:U UB:B)(UF:U UF:F)
        #endregion

        Assert.False(single);
        Assert.Equal("(UB:U UB:B)(UF:U UF:F)", state);
    }
}
