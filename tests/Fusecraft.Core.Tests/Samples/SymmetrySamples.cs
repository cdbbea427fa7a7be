using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Samples;

/// <summary>The C# samples of the page on symmetry and sameness; the regions are the text shown there.</summary>
public class SymmetrySamples
{
    [Fact]
    public void Group()
    {
        #region Symmetry.Group
        var cube = MechanismBuilder.Cube("Corner stone", 3).Block("UFR", "UF").Build();

        var symmetries = SymmetryGroup.Of(cube).Order;              // 48
        var ofHome = SymmetryGroup.Of(cube).FixingHome().Order;     // 2
        #endregion

        Assert.Equal(48, symmetries);
        Assert.Equal(2, ofHome);
    }

    [Fact]
    public void Orbits()
    {
        var path = Repository.PathOf("docs/workshop/weir-gate.fuse.json");

        #region Symmetry.Orbits
        var orbits = ShapeOrbits.Explore(MechanismFile.Load(path));

        var upToSymmetry = orbits.RepresentativeCount;    // 288
        var shapes = orbits.ShapeCount;                   // 2244, as many as a plain exploration counts
        var ofRegion = orbits.HomeRegionSymmetryCount;    // 8: the other 40 carry home out of reach
        var order = orbits.VertexGroupAtHome().Order;     // 627056640
        #endregion

        Assert.Equal(288, upToSymmetry);
        Assert.Equal(2244, shapes);
        Assert.Equal(8, ofRegion);
        Assert.Equal(627056640, order);
    }

    [Fact]
    public void Compare()
    {
        #region Symmetry.Compare
        var one = MechanismBuilder.Cube("Twin roof", 2).Block("UFR", "UFL").Build();
        var other = MechanismBuilder.Cube("Twin cellar", 2).Block("DBL", "DBR").Build();

        var comparison = MechanismComparison.Of(one, other);
        var verdict = comparison.Verdict;                  // SamePuzzle
        var isHeldOtherwise = comparison.HomeMatch!.IsRepinned; // true: 9 shapes in one hand, 1 in the other
        #endregion

        Assert.Equal(ComparisonVerdict.SamePuzzle, verdict);
        Assert.True(isHeldOtherwise);
        Assert.Equal((9, 1), (comparison.FirstGroupoid.ShapeCount, comparison.SecondGroupoid.ShapeCount));
        Assert.Equal("29160", comparison.Figures[^1].First);
        Assert.Equal("29160", comparison.Figures[^1].Second);
    }
}
