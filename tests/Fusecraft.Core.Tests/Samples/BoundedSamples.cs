using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on bounded words; the regions are the text shown there.</summary>
public class BoundedSamples
{
    [Fact]
    public void Search()
    {
        #region Bounded.Search
        var cube = MechanismBuilder.Cube("Corner stone", 2).Build();
        var search = new BoundedSearch(cube, new BoundedOptions { Metric = Metric.Run, MaxNodes = 10_000_000 });

        var result = search.Find(cube.ParseState("U R2 F' U R"), cube.HomeState, maxLength: 11);
        var outcome = result.Outcome;       // Found
        var length = result.LowerBound;     // 5 runs, and none is shorter
        #endregion

        Assert.Equal((BoundedOutcome.Found, 5L), (outcome, length));
    }

    [Fact]
    public void Table()
    {
        #region Bounded.Table
        var cube = MechanismBuilder.Cube("Corner stone", 2).Build();

        // Where the pieces are, whichever way they lie; and which way they lie, wherever they are.
        var places = CosetCoordinates.OfColouring(cube, [.. cube.PieceOfSite])!;
        var lies = CosetCoordinates.OfColouring(cube, [.. cube.SiteNames.Select(name => name[^1] is 'U' or 'D' ? 1 : 0)])!;
        var both = PruningTable.Build(places, lies, Metric.Run)!;

        var bound = both.Bound(cube.ParseState("U R2 F' U R"));    // 5: together they tell all states apart
        #endregion

        Assert.Equal((5040, 729, 5), (places.Count, lies.Count, bound));
    }

    [Fact]
    public void Coordinates()
    {
        #region Bounded.Coordinates
        var cube = MechanismBuilder.Cube("Corner stone", 2).Build();
        var corner = CosetCoordinates.OfPieces(cube, [cube.FindPiece("UFR")!.Value])!;

        var count = corner.Count;                                  // 21: seven places, three ways to lie in each
        var here = corner.Rank(cube.ParseState("R U"));
        var step = cube.Steps[0];
        var next = corner.StepTable[(here * corner.StepCount) + step.Index];
        #endregion

        Assert.Equal(21, count);
        Assert.Equal(corner.Rank(cube.ParseState("R U").After(step)), next);
    }

    [Fact]
    public void Census()
    {
        #region Bounded.Census
        var cube = MechanismBuilder.Cube("Corner stone", 3).Build();
        var census = DepthCensus.Take(cube.HomeState, 4, Metric.Run);

        var atFour = census.Counts[4];    // 43239
        #endregion

        Assert.Equal(43239, atFour);
    }
}
